import type { Version } from '#shared/contracts/version.ts';
import { balancePoint } from '#shared/specs/balance.ts';
import type { FieldVersion } from '#src/components/drawing/field-marks.ts';
import { formatDay } from '#src/composables/format-time.ts';
import { versionTitle } from './version-title.ts';

/** Versions as dated points on the balance field, oldest first; those of one spec make one trail. */
export function fieldTrail(versions: readonly Version[]): FieldVersion[] {
  const isOfSeveralSpecs = new Set(versions.map(({ specId }) => specId)).size > 1;
  return [...versions]
    .sort((a, b) => a.createdAt.localeCompare(b.createdAt))
    .map((version) => ({
      key: version.id,
      ...balancePoint(version.figures),
      label: isOfSeveralSpecs
        ? `${version.variantName ?? version.specName} ${version.number}`
        : String(version.number),
      name: versionTitle(version),
      day: formatDay(version.createdAt),
      trail: version.specId,
    }));
}
