import type { Figures } from '../contracts/version.ts';
import { changeText } from '../text/change-text.ts';
import { METRIC_UNITS, figureParts } from '../text/format-figure.ts';
import { type ComparedFigure, FIGURE_LABELS, figureDifferences } from './figure-differences.ts';

/** Figures that are worth a sentence when they move; the others follow from them. */
const TOLD_FIGURES: ReadonlySet<ComparedFigure> = new Set([
  'dilutionFraction',
  'finalMl',
  'abvFraction',
  'sugarGPerL',
  'acidCitricGPerL',
  'sugarAcidRatio',
  'headroomMl',
]);

/** The figures that moved by something that shows, and what the drink contains now or no longer. */
export function describeFigureChanges(input: {
  readonly before: Figures;
  readonly after: Figures;
}): string[] {
  const { before, after } = input;
  const isSetByHand = before.dilutionKind === 'by hand' && after.dilutionKind === 'by hand';
  const moved = figureDifferences([before, after]).flatMap(({ figure, cells }) => {
    if (!TOLD_FIGURES.has(figure) || (figure === 'dilutionFraction' && isSetByHand)) return [];
    const [from, to] = [cells[0]?.value ?? null, cells[1]?.value ?? null];
    const isSame = cells[1]?.direction === 'same' || from === to;
    const isNewGlass = figure === 'headroomMl' && (from === null || to === null);
    return isSame || isNewGlass ? [] : [`${FIGURE_LABELS[figure]} ${figureChange({ figure, from, to })}`];
  });
  return [...moved, ...describeAllergens(input)];
}

function figureChange(input: {
  readonly figure: ComparedFigure;
  readonly from: number | null;
  readonly to: number | null;
}): string {
  const { figure } = input;
  const [from, to] = [input.from, input.to].map((value) =>
    value === null ? { number: 'none', unit: '' } : figureParts({ figure, value, ...METRIC_UNITS }),
  );
  return changeText({
    from: from?.number ?? '',
    to: to?.number ?? '',
    fromUnit: plainSpaces(from?.unit ?? ''),
    toUnit: plainSpaces(to?.unit ?? ''),
  });
}

function plainSpaces(text: string): string {
  return text.replace(/\u00a0/g, ' ');
}

function describeAllergens(input: { readonly before: Figures; readonly after: Figures }): string[] {
  const before = new Set<string>(input.before.allergens.contains);
  const after = new Set<string>(input.after.allergens.contains);
  const gained = [...after].filter((allergen) => !before.has(allergen));
  const lost = [...before].filter((allergen) => !after.has(allergen));
  return [
    ...(gained.length > 0 ? [`now contains ${gained.join(', ')}`] : []),
    ...(lost.length > 0 ? [`no longer contains ${lost.join(', ')}`] : []),
  ];
}
