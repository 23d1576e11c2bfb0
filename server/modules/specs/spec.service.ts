import { randomUUID } from 'node:crypto';

import type { FieldError } from '#shared/contracts/problem.ts';
import type {
  Branch,
  DraftBody,
  Spec as SpecResource,
  SpecCreate,
  SpecUpdate,
} from '#shared/contracts/spec.ts';
import { blankDraft } from '#shared/specs/blank-draft.ts';
import { draftFromBody } from '#shared/specs/complete-draft.ts';

import { problems } from '../../http/problems.ts';
import type { ActingContext } from '../../http/route.ts';
import { User } from '../accounts/account.entity.ts';
import { findGlass } from '../glasses/index.ts';
import { findIngredients } from '../ingredients/index.ts';
import { recordEvent } from '../teams/index.ts';
import { Spec } from './spec.entity.ts';
import { titleOf, toSpec } from './spec.mapper.ts';
import { findSiblings, loadSpec, loadSpecForChange } from './spec.queries.ts';
import { loadVersion } from './version.queries.ts';

export async function createSpec(
  context: ActingContext,
  { name, description }: SpecCreate,
): Promise<SpecResource> {
  const { em, teamId, person, now } = context;
  const id = randomUUID();
  const spec = em.create(Spec, {
    id,
    team: teamId,
    familyId: id,
    name: name.trim(),
    description: description?.trim() ?? '',
    draft: blankDraft(),
    createdAt: now(),
    updatedAt: now(),
    updatedBy: person.id,
  });
  recordSpecEvent(context, { spec, action: 'spec.created', summary: `Started the spec ${titleOf(spec)}` });
  await em.flush();
  return readSpec(context, id);
}

/** A new variant whose draft is the body of a version; its first version will name that one as its parent. */
export async function branchSpec(
  context: ActingContext,
  { specId, branch }: { specId: string; branch: Branch },
): Promise<SpecResource> {
  const { em, teamId, person, now } = context;
  const origin = await loadSpec(em, { teamId, specId });
  const version = await loadVersion(em, { teamId, versionId: branch.fromVersionId });
  if (version.spec.id !== specId) throw problems.notFound('version', branch.fromVersionId);
  const id = randomUUID();
  const spec = em.create(Spec, {
    id,
    team: teamId,
    familyId: origin.familyId,
    name: origin.name,
    variantName: branch.variantName.trim(),
    description: origin.description,
    draft: draftFromBody(version.body),
    draftBaseVersionId: version.id,
    branchedFromVersionId: version.id,
    createdAt: now(),
    updatedAt: now(),
    updatedBy: person.id,
  });
  const summary = `Branched ${titleOf(spec)} from ${titleOf(origin)} version ${version.number}`;
  recordSpecEvent(context, { spec, action: 'spec.branched', summary });
  await em.flush();
  return readSpec(context, id);
}

export async function readSpec({ em, teamId }: ActingContext, specId: string): Promise<SpecResource> {
  const fresh = em.fork({ keepTransactionContext: true });
  const spec = await loadSpec(fresh, { teamId, specId });
  return toSpec(spec, await findSiblings(fresh, spec));
}

export function renameSpec(
  context: ActingContext,
  { specId, update, ifMatch }: { specId: string; update: SpecUpdate; ifMatch: number },
): Promise<SpecResource> {
  return changeSpec(context, { specId, ifMatch }, (spec, inside) => {
    const before = titleOf(spec);
    spec.name = update.name.trim();
    spec.variantName = update.variantName?.trim() ?? null;
    spec.description = update.description.trim();
    const after = titleOf(spec);
    const summary = before === after ? `Described ${after} anew` : `Renamed ${before} to ${after}`;
    recordSpecEvent(inside, { spec, action: 'spec.renamed', summary });
  });
}

export function setSpecRetired(
  context: ActingContext,
  { specId, retired, ifMatch }: { specId: string; retired: boolean; ifMatch: number },
): Promise<SpecResource> {
  return changeSpec(context, { specId, ifMatch, evenRetired: true }, (spec, inside) => {
    spec.retiredAt = retired ? context.now() : null;
    const summary = `${retired ? 'Retired' : 'Brought back'} the spec ${titleOf(spec)}`;
    recordSpecEvent(inside, { spec, action: retired ? 'spec.retired' : 'spec.restored', summary });
  });
}

/** Replaces the working draft. History keeps versions, not keystrokes, so a draft leaves no event. */
export async function putDraft(
  context: ActingContext,
  { specId, draft, ifMatch }: { specId: string; draft: DraftBody; ifMatch: number },
): Promise<SpecResource> {
  refuseRepeatedLines(draft);
  await refuseForeignIds(context, draft);
  return changeDraft(context, { specId, ifMatch }, (spec) => {
    spec.draft = draft;
    return Promise.resolve();
  });
}

/** Puts a version of the same spec or of a sibling in place of the draft; it becomes the base. */
export function startDraftFromVersion(
  context: ActingContext,
  { specId, versionId, ifMatch }: { specId: string; versionId: string; ifMatch: number },
): Promise<SpecResource> {
  return changeDraft(context, { specId, ifMatch }, async (spec, { em, teamId }) => {
    const version = await loadVersion(em, { teamId, versionId });
    if (version.spec.familyId !== spec.familyId) throw problems.notFound('version', versionId);
    spec.draft = draftFromBody(version.body);
    spec.draftBaseVersionId = version.id;
  });
}

/** An edit of the name, the description or the use of a spec, guarded by its revision. */
async function changeSpec(
  context: ActingContext,
  guard: { specId: string; ifMatch: number; evenRetired?: boolean },
  change: (spec: Spec, inside: ActingContext) => void,
): Promise<SpecResource> {
  await inTransaction(context, async (inside) => {
    const spec = await loadSpecForChange(inside.em, { teamId: inside.teamId, specId: guard.specId });
    if (spec.revision !== guard.ifMatch) throw await staleSpec(inside, spec, spec.revision);
    if (guard.evenRetired !== true) refuseRetired(spec);
    change(spec, inside);
    spec.revision += 1;
    touch(spec, inside);
  });
  return readSpec(context, guard.specId);
}

/** An edit of the working draft, guarded by the draft's own revision. */
async function changeDraft(
  context: ActingContext,
  guard: { specId: string; ifMatch: number },
  change: (spec: Spec, inside: ActingContext) => Promise<void>,
): Promise<SpecResource> {
  await inTransaction(context, async (inside) => {
    const spec = await loadSpecForChange(inside.em, { teamId: inside.teamId, specId: guard.specId });
    await refuseStaleDraft(inside, spec, guard.ifMatch);
    refuseRetired(spec);
    await change(spec, inside);
    spec.draftRevision += 1;
    touch(spec, inside);
  });
  return readSpec(context, guard.specId);
}

/** Notes who changed the spec, and when. */
export function touch(spec: Spec, { em, person, now }: ActingContext): void {
  spec.updatedAt = now();
  spec.updatedBy = em.getReference(User, person.id);
}

/** Runs a use case in one transaction; `inside` is the context with the transaction's entity manager. */
export function inTransaction<Result>(
  context: ActingContext,
  work: (inside: ActingContext) => Promise<Result>,
): Promise<Result> {
  return context.em.transactional((em) => work({ ...context, em: em }));
}

/**
 * Refuses a draft that was written meanwhile. `inside` must be the context of the transaction that holds the spec: reading the
 * present state on a second connection would, with enough people saving, wait for connections that wait for this row.
 */
export async function refuseStaleDraft(inside: ActingContext, spec: Spec, ifMatch: number): Promise<void> {
  if (spec.draftRevision !== ifMatch) throw await staleSpec(inside, spec, spec.draftRevision);
}

async function staleSpec(inside: ActingContext, spec: Spec, revision: number) {
  return problems.staleVersion(revision, await readSpec(inside, spec.id));
}

export function refuseRetired(spec: Spec): void {
  if (spec.retiredAt == null) return;
  throw problems.notAllowedInState(`${titleOf(spec)} is retired. Bring it back before changing it.`);
}

/** A line's id tells it from the others, in figures, in comparison and on the page. */
function refuseRepeatedLines({ lines }: DraftBody): void {
  const ids = lines.map(({ id }) => id.toLowerCase());
  const errors = ids.flatMap((id, index) => {
    const first = ids.indexOf(id);
    if (first === index) return [];
    const detail = `Line ${index + 1} has the same id as line ${first + 1}.`;
    return [{ pointer: `#/lines/${index}/id`, code: 'twice', detail }];
  });
  if (errors.length > 0) throw problems.invalidFields(errors);
}

/** Ingredients and the glass of a draft must be the team's own; another team's are unknown here. */
async function refuseForeignIds({ em, teamId }: ActingContext, draft: DraftBody): Promise<void> {
  const errors: FieldError[] = [];
  const ids = draft.lines.flatMap(({ ingredientId }) => (ingredientId === null ? [] : [ingredientId]));
  const known = new Set((await findIngredients(em, { teamId, ids })).map((ingredient) => ingredient.id));
  draft.lines.forEach(({ ingredientId }, index) => {
    if (ingredientId === null || known.has(ingredientId)) return;
    const detail = `Line ${index + 1} names an ingredient that is not in this back bar.`;
    errors.push({ pointer: `#/lines/${index}/ingredientId`, code: 'unknown-ingredient', detail });
  });
  const { glassId } = draft;
  if (glassId !== null && (await findGlass(em, { teamId, glassId })) === null) {
    errors.push({
      pointer: '#/glassId',
      code: 'unknown-glass',
      detail: 'The glass is not one of this team.',
    });
  }
  if (errors.length > 0) throw problems.invalidFields(errors);
}

export function recordSpecEvent(
  { em, teamId, person, now }: Pick<ActingContext, 'em' | 'teamId' | 'person' | 'now'>,
  { spec, action, summary }: { spec: Pick<Spec, 'id'>; action: string; summary: string },
): void {
  recordEvent(em, { teamId, person, action, subjectType: 'spec', subjectId: spec.id, summary, at: now() });
}
