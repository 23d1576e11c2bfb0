/** What can stand on the balance field, and how each is called in words. */
import { formatGPerL, formatRatio } from '#shared/text/format-quantity.ts';

interface FieldPlace {
  readonly key: string;
  readonly acidCitricGPerL: number;
  readonly sugarGPerL: number;
}

/** A published drink: quiet, its name and source on request. */
export interface FieldReference extends FieldPlace {
  readonly name: string;
  readonly source: string;
}

/** A version, on the trail of its spec. */
export interface FieldVersion extends FieldPlace {
  /** Short, beside the point: `3`. */
  readonly label: string;
  /** In full: `Harbour Sour, version 3`. */
  readonly name: string;
  /** Such as `1 Dec 2026`. */
  readonly day: string;
  /** Points of one trail are joined in the order given; several specs have several trails. */
  readonly trail: string;
}

/** The draft being edited, or the one drink that is shown. */
export interface FieldLive extends FieldPlace {
  readonly name: string;
  /** Half axes of the ellipse in which the drink lies with the probability that `uncertaintyName` says. */
  readonly uncertainty?: FieldUncertainty | null;
}

export interface FieldUncertainty {
  readonly acidCitricGPerL: number;
  readonly sugarGPerL: number;
  /** -1 to 1; 0 is an ellipse along the axes. */
  readonly correlation: number;
  /** Such as `pour and composition, about 90 %`. */
  readonly name: string;
}

/** What the live point is compared with. */
export interface FieldGhost extends FieldPlace {
  readonly name: string;
}

export type MarkKind = 'reference' | 'version' | 'ghost' | 'live';

export interface FieldMark extends FieldPlace {
  readonly kind: MarkKind;
  /** Beside the point; empty for a quiet one. */
  readonly label: string;
  readonly name: string;
  /** Source of a published drink, day of a version. */
  readonly detail: string;
  readonly trail: string | null;
}

export interface FieldContents {
  readonly references: readonly FieldReference[];
  readonly versions: readonly FieldVersion[];
  readonly ghost: FieldGhost | null;
  readonly live: FieldLive | null;
}

/** Every point of the field, the quiet ones first, so that the draft lies on top. */
export function fieldMarks(input: FieldContents): FieldMark[] {
  const references = input.references.map((reference) => ({
    ...reference,
    kind: 'reference' as const,
    label: '',
    detail: `Published drink. Source: ${reference.source}`,
    trail: null,
  }));
  const versions = input.versions.map((version) => ({
    ...version,
    kind: 'version' as const,
    detail: version.day,
  }));
  const ghost = input.ghost === null ? [] : [{ ...input.ghost, kind: 'ghost' as const }];
  const live = input.live === null ? [] : [{ ...input.live, kind: 'live' as const }];
  return [
    ...references,
    ...versions,
    ...ghost.map((mark) => ({ ...mark, label: mark.name, detail: 'Compared with', trail: null })),
    ...live.map((mark) => ({ ...mark, label: mark.name, detail: '', trail: null })),
  ];
}

/** `8.4 g/L acid, 84 g/L sugar, 10.0 : 1`. */
export function placeWords(mark: Pick<FieldMark, 'acidCitricGPerL' | 'sugarGPerL'>): string {
  const { acidCitricGPerL: acid, sugarGPerL: sugar } = mark;
  const ratio = acid > 0 ? `, sugar to acid ${formatRatio(sugar / acid)}` : '';
  return `${formatGPerL(acid)} acid, ${formatGPerL(sugar)} sugar${ratio}`;
}

/** The whole point in one sentence, as it is read out. */
export function markWords(mark: FieldMark): string {
  const detail = mark.detail === '' ? '' : `. ${mark.detail}`;
  return `${mark.name}: ${placeWords(mark)}${detail}`;
}
