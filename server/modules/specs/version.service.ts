import { randomUUID } from 'node:crypto';

import type { GlassSnapshot } from '#shared/contracts/glass.ts';
import type { SpecBody } from '#shared/contracts/spec.ts';
import type { Figures, IngredientSnapshot, Version } from '#shared/contracts/version.ts';
import { DomainError } from '#shared/physics/domain-error.ts';
import { CALCULATION_VERSION } from '#shared/specs/calculation-version.ts';
import { completeDraft } from '#shared/specs/complete-draft.ts';
import { describeChanges } from '#shared/specs/describe-changes.ts';
import { evaluateSpec } from '#shared/specs/evaluate-spec.ts';

import { problems } from '../../http/problems.ts';
import type { ActingContext } from '../../http/route.ts';
import { findGlass, toGlassSnapshot } from '../glasses/index.ts';
import { findIngredients, toIngredientSnapshot } from '../ingredients/index.ts';
import { loadTeam } from '../teams/index.ts';
import { type Spec, SpecVersion } from './spec.entity.ts';
import { titleOf } from './spec.mapper.ts';
import { loadSpecForChange } from './spec.queries.ts';
import { inTransaction, recordSpecEvent, refuseRetired, refuseStaleDraft, touch } from './spec.service.ts';
import { toVersion } from './version.mapper.ts';
import { countNotes, findVersionsOfSpec, loadVersion, loadVersions } from './version.queries.ts';

/** Makes the working draft the next version: completed, calculated here, and never changed again. */
export async function saveVersion(
  context: ActingContext,
  { specId, why, ifMatch }: { specId: string; why: string; ifMatch: number },
): Promise<Version> {
  const versionId = randomUUID();
  await inTransaction(context, async (inside) => {
    const { em, teamId, person, now } = inside;
    const spec = await loadSpecForChange(em, { teamId, specId });
    await refuseStaleDraft(inside, spec, ifMatch);
    refuseRetired(spec);
    const snapshot = await takeSnapshot(inside, spec);
    const base = spec.draftBaseVersionId
      ? await loadVersion(em, { teamId, versionId: spec.draftBaseVersionId })
      : null;
    const number = (spec.latestNumber ?? 0) + 1;
    const changes = base === null ? [] : describeChanges({ before: sideOf(base), after: snapshot });
    em.create(SpecVersion, {
      ...snapshot,
      id: versionId,
      team: teamId,
      spec,
      number,
      parent: base,
      state: 'draft',
      calculationVersion: CALCULATION_VERSION,
      why: why.trim(),
      changes,
      author: person.id,
      createdAt: now(),
    });
    showAsLatest(spec, { id: versionId, number, figures: snapshot.figures });
    touch(spec, inside);
    const summary = `Saved ${titleOf(spec)} version ${number}: ${why.trim()}`;
    recordSpecEvent(inside, { spec, action: 'version.saved', summary });
  });
  return readVersion(context, versionId);
}

/** Repeats the newest version on the spec, where lists read it, and makes it the draft's base. */
function showAsLatest(
  spec: Spec,
  { id, number, figures }: { id: string; number: number; figures: Figures },
): void {
  spec.latestVersionId = id;
  spec.latestNumber = number;
  spec.latestState = 'draft';
  spec.draftBaseVersionId = id;
  spec.draftRevision += 1;
  spec.finalMl = figures.finalMl;
  spec.abvFraction = figures.abvFraction;
  spec.sugarGPerL = figures.sugarGPerL;
  spec.acidCitricGPerL = figures.acidCitricGPerL;
}

interface Snapshot {
  body: SpecBody;
  ingredients: IngredientSnapshot[];
  glass: GlassSnapshot | null;
  houseMeasures: Version['houseMeasures'];
  figures: Figures;
}

/** Everything the figures follow from, as it is now, and the figures. */
async function takeSnapshot({ em, teamId }: ActingContext, spec: Spec): Promise<Snapshot> {
  const completed = completeDraft(spec.draft);
  if (!completed.ok) throw problems.invalidFields(completed.errors);
  const { body } = completed;
  const ids = [...new Set(body.lines.map((line) => line.ingredientId))];
  const ingredients = (await findIngredients(em, { teamId, ids })).map(toIngredientSnapshot);
  const glass = body.glassId === null ? null : await findGlass(em, { teamId, glassId: body.glassId });
  const { houseMeasures } = await loadTeam(em, teamId);
  const context = { body, ingredients, glass: glass && toGlassSnapshot(glass), houseMeasures };
  return { ...context, figures: figuresOf({ ...context, draft: spec.draft }) };
}

/** The figures of a complete body; a line that cannot be computed is refused at its place in the draft. */
function figuresOf(input: Omit<Snapshot, 'figures'> & { draft: Spec['draft'] }): Figures {
  const { body, glass, houseMeasures, draft } = input;
  const ingredients = new Map(input.ingredients.map((ingredient) => [ingredient.id, ingredient]));
  try {
    const { figures, lines } = evaluateSpec({ body, ingredients, glass, houseMeasures });
    const errors = lines.flatMap((line) => {
      if (line.ok) return [];
      const index = draft.lines.findIndex(({ id }) => id === line.lineId);
      return [{ pointer: `#/lines/${index}`, code: line.reason, detail: line.detail }];
    });
    if (errors.length > 0) throw problems.invalidFields(errors);
    if (figures === null)
      throw problems.invalidField('#/lines', 'min-items', 'A version needs at least one line.');
    return figures;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw problems.invalidField('#/lines', 'domain', `These lines cannot be one drink: ${error.message}.`);
  }
}

function sideOf({ body, ingredients, glass, figures }: SpecVersion) {
  return { body, ingredients, glass: glass ?? null, figures };
}

export async function readVersion({ em, teamId }: ActingContext, versionId: string): Promise<Version> {
  const [version] = await readVersions({ em, teamId }, [versionId]);
  if (version === undefined) throw problems.notFound('version', versionId);
  return version;
}

/** Versions in the order asked for, each with its number of notes. */
export async function readVersions(
  { em, teamId }: Pick<ActingContext, 'em' | 'teamId'>,
  ids: readonly string[],
): Promise<Version[]> {
  const fresh = em.fork({ keepTransactionContext: true });
  const versions = await loadVersions(fresh, { teamId, ids });
  const counts = await countNotes(fresh, versions);
  return versions.map((version) => toVersion(version, counts.get(version.id) ?? 0));
}

export async function readVersionsOfSpec({ em, teamId }: ActingContext, specId: string): Promise<Version[]> {
  const versions = await findVersionsOfSpec(em, { teamId, specId });
  const counts = await countNotes(em, versions);
  return versions.map((version) => toVersion(version, counts.get(version.id) ?? 0));
}
