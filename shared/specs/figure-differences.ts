import type { Figures } from '../contracts/version.ts';

/** Figures that are compared, in the order they are shown. */
export const COMPARED_FIGURES = [
  'finalMl',
  'abvFraction',
  'sugarGPerL',
  'acidCitricGPerL',
  'sugarAcidRatio',
  'dilutionFraction',
  'undilutedMl',
  'undilutedAbvFraction',
  'ethanolG',
  'sugarG',
  'acidCitricG',
  'energyKcal',
  'freezingPointC',
  'washLineMm',
  'headroomMl',
] as const;
export type ComparedFigure = (typeof COMPARED_FIGURES)[number];

export interface FigureDifference {
  /** null where the version has no such figure (no acid, no glass). */
  readonly value: number | null;
  /** Against the first version, in the unit of the figure; null when either has none. */
  readonly difference: number | null;
  /** `same` also when the difference is too small to be shown. */
  readonly direction: 'up' | 'down' | 'same' | 'unknown';
}

export interface FigureRow {
  readonly figure: ComparedFigure;
  readonly label: string;
  /** One a version, in the order given; the first is the one the others are compared with. */
  readonly cells: readonly FigureDifference[];
  readonly isSame: boolean;
}

export function figureDifferences(_figures: readonly (Figures | null)[]): FigureRow[] {
  throw new Error('being written');
}
