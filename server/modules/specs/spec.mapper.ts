import type { PersonRef } from '#shared/contracts/common.ts';
import type { Spec as SpecResource, SpecSummary, VersionRef, VersionState } from '#shared/contracts/spec.ts';

import type { Spec } from './spec.entity.ts';

export type Sibling = SpecResource['siblings'][number];

export function toSpecSummary(spec: Spec): SpecSummary {
  return {
    id: spec.id,
    revision: spec.revision,
    familyId: spec.familyId,
    name: spec.name,
    variantName: spec.variantName ?? null,
    latestVersion: versionRef(spec.latestVersionId, spec.latestNumber, spec.latestState),
    lockedVersion: versionRef(spec.lockedVersionId, spec.lockedNumber, 'locked'),
    headline: headlineOf(spec),
    updatedAt: spec.updatedAt.toISOString(),
    updatedBy: toPersonRef(spec.updatedBy),
    retiredAt: spec.retiredAt?.toISOString() ?? null,
  };
}

export function toSpec(spec: Spec, siblings: Sibling[]): SpecResource {
  return {
    ...toSpecSummary(spec),
    description: spec.description,
    draft: spec.draft,
    draftRevision: spec.draftRevision,
    draftBaseVersionId: spec.draftBaseVersionId ?? null,
    branchedFromVersionId: spec.branchedFromVersionId ?? null,
    createdAt: spec.createdAt.toISOString(),
    siblings,
  };
}

/** A drink and its variant in one breath, for history and messages. */
export function titleOf(spec: { name: string; variantName?: string | null }): string {
  return spec.variantName == null ? spec.name : `${spec.name} (${spec.variantName})`;
}

export function toPersonRef(user: { id: string; name: string } | null | undefined): PersonRef | null {
  return user ? { id: user.id, name: user.name } : null;
}

function versionRef(
  id: string | null | undefined,
  number: number | null | undefined,
  state: VersionState | null | undefined,
): VersionRef | null {
  return id != null && number != null && state != null ? { id, number, state } : null;
}

function headlineOf({ finalMl, abvFraction, sugarGPerL, acidCitricGPerL }: Spec): SpecSummary['headline'] {
  if (finalMl == null || abvFraction == null || sugarGPerL == null || acidCitricGPerL == null) return null;
  return { finalMl, abvFraction, sugarGPerL, acidCitricGPerL };
}
