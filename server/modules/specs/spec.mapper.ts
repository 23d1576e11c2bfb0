import type { PersonRef } from '#shared/contracts/common.ts';
import type { Spec as SpecResource, SpecSummary, VersionRef, VersionState } from '#shared/contracts/spec.ts';

import type { Spec } from './spec.entity.ts';

export type Sibling = SpecResource['siblings'][number];

/** A spec as the list's statement reads it. */
export interface SpecRow {
  id: string;
  revision: number;
  family_id: string;
  name: string;
  variant_name: string | null;
  latest_version_id: string | null;
  latest_number: number | null;
  latest_state: VersionState | null;
  locked_version_id: string | null;
  locked_number: number | null;
  final_ml: number | null;
  abv_fraction: number | null;
  sugar_g_per_l: number | null;
  acid_citric_g_per_l: number | null;
  updated_at_ms: number;
  retired_at_ms: number | null;
  updated_by_id: string | null;
  updated_by_name: string | null;
}

export function summaryOfRow(row: SpecRow): SpecSummary {
  const { updated_by_id: userId, updated_by_name: userName } = row;
  return {
    id: row.id,
    revision: row.revision,
    familyId: row.family_id,
    name: row.name,
    variantName: row.variant_name,
    latestVersion: versionRef(row.latest_version_id, row.latest_number, row.latest_state),
    lockedVersion: versionRef(row.locked_version_id, row.locked_number, 'locked'),
    headline: headlineOf({
      finalMl: row.final_ml,
      abvFraction: row.abv_fraction,
      sugarGPerL: row.sugar_g_per_l,
      acidCitricGPerL: row.acid_citric_g_per_l,
    }),
    updatedAt: new Date(row.updated_at_ms).toISOString(),
    updatedBy: userId === null || userName === null ? null : { id: userId, name: userName },
    retiredAt: row.retired_at_ms === null ? null : new Date(row.retired_at_ms).toISOString(),
  };
}

function toSpecSummary(spec: Spec): SpecSummary {
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

type Headline = Pick<Spec, 'finalMl' | 'abvFraction' | 'sugarGPerL' | 'acidCitricGPerL'>;

function headlineOf({
  finalMl,
  abvFraction,
  sugarGPerL,
  acidCitricGPerL,
}: Headline): SpecSummary['headline'] {
  if (finalMl == null || abvFraction == null || sugarGPerL == null || acidCitricGPerL == null) return null;
  return { finalMl, abvFraction, sugarGPerL, acidCitricGPerL };
}
