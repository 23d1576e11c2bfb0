import type { Figures } from '../contracts/version.ts';
import { shownStep } from '../text/format-figure.ts';

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

/** What a person calls each figure. */
export const FIGURE_LABELS: Readonly<Record<ComparedFigure, string>> = {
  finalMl: 'final volume',
  abvFraction: 'final ABV',
  sugarGPerL: 'final sugar',
  acidCitricGPerL: 'final acid',
  sugarAcidRatio: 'ratio',
  dilutionFraction: 'dilution',
  undilutedMl: 'undiluted volume',
  undilutedAbvFraction: 'undiluted ABV',
  ethanolG: 'ethanol in the drink',
  sugarG: 'sugar in the drink',
  acidCitricG: 'acid in the drink',
  energyKcal: 'energy',
  freezingPointC: 'freezing point',
  washLineMm: 'wash line',
  headroomMl: 'left to the brim',
};

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
  /** Whether every version has the same, or none of them has it. */
  readonly isSame: boolean;
}

/** One compared figure, in its internal unit; null where there is none. */
export function valueOfFigure(input: {
  readonly figures: Figures | null;
  readonly figure: ComparedFigure;
}): number | null {
  const { figures, figure } = input;
  if (figures === null) return null;
  if (figure === 'washLineMm') return figures.washLine?.heightMm ?? null;
  if (figure === 'headroomMl') return figures.washLine?.headroomMl ?? null;
  return figures[figure];
}

/**
 * Every compared figure of several versions, each with its difference to the first.
 *
 * A difference smaller than one step of the last digit shown is `same`: rounding noise is no change.
 * @param figures   figures by version, the first being the one to compare with
 */
export function figureDifferences(figures: readonly (Figures | null)[]): FigureRow[] {
  return COMPARED_FIGURES.map((figure) => {
    const values = figures.map((each) => valueOfFigure({ figures: each, figure }));
    const first = values[0] ?? null;
    const cells = values.map((value) => differenceTo({ figure, first, value }));
    const isSame =
      cells.every((cell) => cell.direction === 'same') || values.every((value) => value === null);
    return { figure, label: FIGURE_LABELS[figure], cells, isSame };
  });
}

/** Takes the edge off binary fractions: 8.4 - 8.3 is a step of 0.1. */
const STEP_TOLERANCE = 1e-9;
/** What adding in another order may do to a value, relative. A ratio to a trace of acid is larger than its steps. */
const ARITHMETIC_NOISE = 1e-9;

function differenceTo(input: {
  readonly figure: ComparedFigure;
  readonly first: number | null;
  readonly value: number | null;
}): FigureDifference {
  const { figure, first, value } = input;
  if (first === null || value === null) return { value, difference: null, direction: 'unknown' };
  const difference = value - first;
  const larger = Math.max(Math.abs(first), Math.abs(value));
  const step = shownStep({ figure, value: larger }) * (1 - STEP_TOLERANCE);
  const isShown = Math.abs(difference) >= Math.max(step, ARITHMETIC_NOISE * larger);
  if (!isShown) return { value, difference, direction: 'same' };
  return { value, difference, direction: difference > 0 ? 'up' : 'down' };
}
