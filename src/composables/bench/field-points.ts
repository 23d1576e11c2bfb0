/** The points of the balance field: the trail of the versions, published drinks, the draft. */
import type { Figures, Version } from '#shared/contracts/version.ts';
import { balancePoint } from '#shared/specs/balance.ts';
import type {
  FieldGhost,
  FieldLive,
  FieldReference,
  FieldVersion,
} from '#src/components/drawing/field-marks.ts';
import { formatDay } from '#src/composables/format-time.ts';
import { publishedReferences } from './published-references.ts';
import type { ComparedWith } from './useComparedWith.ts';

/** All published drinks, without the one that is compared with already. */
export function publishedPoints(comparedKey: string | null): FieldReference[] {
  return publishedReferences()
    .map(({ key, name, source, figures }) => ({
      key: `published-${key}`,
      name,
      source,
      ...balancePoint(figures),
    }))
    .filter(({ key }) => key !== comparedKey);
}

/** Oldest first, as a trail runs. */
export function versionPoints(versions: readonly Version[]): FieldVersion[] {
  return [...versions]
    .sort((a, b) => a.number - b.number)
    .map((version) => ({
      key: version.id,
      label: String(version.number),
      name: `Version ${version.number}`,
      day: formatDay(version.createdAt),
      trail: version.specId,
      ...balancePoint(version.figures),
    }));
}

export function livePoint(figures: Figures | null): FieldLive | null {
  return figures === null ? null : { key: 'draft', name: 'draft', ...balancePoint(figures) };
}

/** A published drink as its own mark; a version stands on the trail already. */
export function ghostPoint(compared: ComparedWith | null): FieldGhost | null {
  return compared === null || !compared.key.startsWith('published-')
    ? null
    : { key: compared.key, name: compared.name, ...balancePoint(compared.figures) };
}
