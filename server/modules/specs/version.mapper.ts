import type { Version } from '#shared/contracts/version.ts';

import type { SpecVersion } from './spec.entity.ts';
import { toPersonRef } from './spec.mapper.ts';

/** A version with its people and its parent loaded. */
export function toVersion(version: SpecVersion, noteCount: number): Version {
  const { spec, houseMeasures } = version;
  return {
    id: version.id,
    revision: version.revision,
    specId: spec.id,
    specName: spec.name,
    variantName: spec.variantName ?? null,
    number: version.number,
    state: version.state,
    parent: parentOf(version),
    why: version.why,
    changes: version.changes,
    author: toPersonRef(version.author),
    createdAt: version.createdAt.toISOString(),
    lock: lockOf(version),
    noteCount,
    body: version.body,
    ingredients: version.ingredients,
    glass: version.glass ?? null,
    figures: version.figures,
    calculationVersion: version.calculationVersion,
    houseMeasures: {
      dashMl: houseMeasures.dashMl,
      barSpoonMl: houseMeasures.barSpoonMl,
      dropMl: houseMeasures.dropMl,
    },
  };
}

function parentOf({ parent }: SpecVersion): Version['parent'] {
  if (!parent) return null;
  const { id, spec, number } = parent;
  return { id, specId: spec.id, number, variantName: spec.variantName ?? null };
}

function lockOf({ lockedBy, lockedAt, lockStatement, lockSha256 }: SpecVersion): Version['lock'] {
  if (lockedAt == null || lockStatement == null || lockSha256 == null) return null;
  return {
    by: toPersonRef(lockedBy),
    at: lockedAt.toISOString(),
    statement: lockStatement,
    sha256: lockSha256,
  };
}
