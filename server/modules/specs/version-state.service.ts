import { createHash } from 'node:crypto';

import type { VersionState } from '#shared/contracts/spec.ts';
import type { Version, VersionStateChange } from '#shared/contracts/version.ts';
import { formatAbv, formatVolume } from '#shared/text/format-quantity.ts';

import { canonicalJson } from '../../db/canonical-json.ts';
import { problems } from '../../http/problems.ts';
import type { ActingContext } from '../../http/route.ts';
import { User } from '../accounts/account.entity.ts';
import type { SpecVersion } from './spec.entity.ts';
import { type Spec } from './spec.entity.ts';
import { titleOf } from './spec.mapper.ts';
import { loadSpecForChange } from './spec.queries.ts';
import { inTransaction, recordSpecEvent, refuseRetired, touch } from './spec.service.ts';
import { loadVersion, loadVersionForChange } from './version.queries.ts';
import { readVersion } from './version.service.ts';

interface Guard {
  versionId: string;
  ifMatch: number;
}

/** States from which each change may start; retired is the end. */
const ALLOWED_FROM: Readonly<
  Record<'draft' | 'on trial' | 'locked' | 'retired' | 'unlocked', readonly VersionState[]>
> = {
  draft: ['on trial'],
  'on trial': ['draft'],
  locked: ['draft', 'on trial'],
  retired: ['draft', 'on trial', 'locked'],
  unlocked: ['locked'],
};

export function changeState(
  context: ActingContext,
  { change, ...guard }: Guard & { change: VersionStateChange },
): Promise<Version> {
  return changeVersion(
    context,
    { ...guard, from: ALLOWED_FROM[change.state] },
    ({ version, spec, inside }) => {
      version.state = change.state;
      const words = change.state === 'on trial' ? 'Put on trial' : 'Took back to draft';
      recordVersionEvent(inside, { spec, version, action: 'version.state', words, reason: change.reason });
    },
  );
}

export function retireVersion(
  context: ActingContext,
  { reason, ...guard }: Guard & { reason: string | undefined },
): Promise<Version> {
  return changeVersion(context, { ...guard, from: ALLOWED_FROM.retired }, ({ version, spec, inside }) => {
    version.state = 'retired';
    if (spec.lockedVersionId === version.id) clearLocked(spec);
    recordVersionEvent(inside, { spec, version, action: 'version.retired', words: 'Retired', reason });
  });
}

/** Signs the snapshot of a version. The version locked before, if there is one, is retired by it. */
export function lockVersion(context: ActingContext, guard: Guard): Promise<Version> {
  return changeVersion(
    context,
    { ...guard, from: ALLOWED_FROM.locked },
    async ({ version, spec, inside }) => {
      const { em, teamId, person, now } = inside;
      const earlier = spec.lockedVersionId;
      if (earlier != null) {
        const replaced = await loadVersionForChange(em, { teamId, versionId: earlier });
        replaced.state = 'retired';
        const words = `Retired, since version ${version.number} was locked:`;
        recordVersionEvent(inside, { spec, version: replaced, action: 'version.retired', words });
      }
      const at = now();
      version.state = 'locked';
      version.lockedBy = em.getReference(User, person.id);
      version.lockedAt = at;
      version.lockStatement = statementOf(version, spec);
      version.lockSha256 = digestOf(version, { teamId, signerId: person.id, at });
      spec.lockedVersionId = version.id;
      spec.lockedNumber = version.number;
      recordVersionEvent(inside, { spec, version, action: 'version.locked', words: 'Locked' });
    },
  );
}

export function unlockVersion(
  context: ActingContext,
  { reason, ...guard }: Guard & { reason: string },
): Promise<Version> {
  return changeVersion(context, { ...guard, from: ALLOWED_FROM.unlocked }, ({ version, spec, inside }) => {
    version.state = 'on trial';
    version.lockedBy = null;
    version.lockedAt = null;
    version.lockStatement = null;
    version.lockSha256 = null;
    clearLocked(spec);
    recordVersionEvent(inside, {
      spec,
      version,
      action: 'version.unlocked',
      words: 'Undid the lock of',
      reason,
    });
  });
}

interface Change {
  version: SpecVersion;
  spec: Spec;
  inside: ActingContext;
}

/** One change of state: guarded by the version's revision, allowed only from some states, repeated on the spec. */
async function changeVersion(
  context: ActingContext,
  guard: Guard & { from: readonly VersionState[] },
  change: (change: Change) => void | Promise<void>,
): Promise<Version> {
  const { versionId } = guard;
  await inTransaction(context, async (inside) => {
    const { em, teamId } = inside;
    const { spec: owner } = await loadVersion(em, { teamId, versionId });
    const spec = await loadSpecForChange(em, { teamId, specId: owner.id });
    const version = await loadVersionForChange(em, { teamId, versionId });
    if (version.revision !== guard.ifMatch) {
      throw problems.staleVersion(version.revision, await readVersion(inside, versionId));
    }
    refuseRetired(spec);
    if (!guard.from.includes(version.state)) {
      throw problems.notAllowedInState(
        `Version ${version.number} is ${version.state}; this needs it to be ${guard.from.join(' or ')}.`,
      );
    }
    await change({ version, spec, inside });
    if (spec.latestVersionId === version.id) spec.latestState = version.state;
    touch(spec, inside);
  });
  return readVersion(context, versionId);
}

function clearLocked(spec: Spec): void {
  spec.lockedVersionId = null;
  spec.lockedNumber = null;
}

/** What the signer confirms, in a sentence that names what nobody has reviewed. */
function statementOf(version: SpecVersion, spec: Spec): string {
  const { figures } = version;
  const strength = `${formatVolume({ volumeMl: figures.finalMl, unit: 'ml' })} at ${formatAbv(figures.abvFraction)}`;
  const unreviewed = figures.allergens.notReviewed;
  const allergens =
    unreviewed.length === 0
      ? 'The allergens of every ingredient were reviewed.'
      : `Allergens not reviewed: ${unreviewed.join(', ')}.`;
  return `${titleOf(spec)} version ${version.number}, ${strength} as estimated, is the version to be served. ${allergens}`;
}

/** SHA-256 over canonical JSON of everything that was signed. */
function digestOf(version: SpecVersion, signing: { teamId: string; signerId: string; at: Date }): string {
  const signed = {
    team: signing.teamId,
    spec: version.spec.id,
    number: version.number,
    body: version.body,
    ingredients: version.ingredients,
    glass: version.glass ?? null,
    houseMeasures: version.houseMeasures,
    figures: version.figures,
    calculationVersion: version.calculationVersion,
    signer: signing.signerId,
    at: signing.at.toISOString(),
  };
  return createHash('sha256').update(canonicalJson(signed)).digest('hex');
}

function recordVersionEvent(
  inside: ActingContext,
  event: { spec: Spec; version: SpecVersion; action: string; words: string; reason?: string | undefined },
): void {
  const { spec, version, action, words } = event;
  const reason = event.reason?.trim() ? `: ${event.reason.trim()}` : '';
  const summary = `${words} ${titleOf(spec)} version ${version.number}${reason}`;
  recordSpecEvent(inside, { spec, action, summary });
}
