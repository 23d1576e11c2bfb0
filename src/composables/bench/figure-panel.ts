/** The figures of the bench in the order they are read, each with its full value and its difference to what it is compared with. */
import type { Figures } from '#shared/contracts/version.ts';
import { STANDARD_DRINKS, type StandardDrinkPlace } from '#shared/physics/data/standard-drinks.ts';
import { standardDrinks } from '#shared/physics/standard-drinks.ts';
import { type ComparedFigure, figureDifferences } from '#shared/specs/figure-differences.ts';
import {
  type ShownUnits,
  formatFigure,
  formatFigureDifference,
  formatFull,
  formatFullFigure,
} from '#shared/text/format-figure.ts';
import { formatStandardDrinks, formatVolume } from '#shared/text/format-quantity.ts';

export interface PanelDifference {
  /** Such as `+3.1 g/L`. */
  readonly words: string;
  readonly direction: 'up' | 'down' | 'same' | 'unknown';
}

export interface PanelRow {
  readonly key: string;
  readonly label: string;
  readonly words: string;
  /** With all digits. */
  readonly full: string;
  /** null while nothing is compared, or where it is not. */
  readonly difference: PanelDifference | null;
}

export interface PanelGroup {
  readonly title: string;
  readonly rows: readonly PanelRow[];
}

export interface PanelInput {
  readonly figures: Figures;
  /** What the figures are compared with. */
  readonly reference: Figures | null;
  readonly units: ShownUnits;
  readonly place: StandardDrinkPlace;
}

const SIGNS = { up: '▲', down: '▼', same: '=', unknown: '' } as const;

export function differenceSign(difference: PanelDifference): string {
  return SIGNS[difference.direction];
}

export function figurePanel(input: PanelInput): PanelGroup[] {
  const compared = comparedRows(input);
  const pick = (...figures: ComparedFigure[]): PanelRow[] =>
    figures.flatMap((figure) => compared.get(figure) ?? []);
  return [
    {
      title: 'In the glass',
      rows: pick('finalMl', 'abvFraction', 'sugarGPerL', 'acidCitricGPerL', 'sugarAcidRatio'),
    },
    {
      title: 'Mixing',
      rows: [
        ...pick('undilutedMl', 'undilutedAbvFraction'),
        ...volumeRows(input),
        ...pick('dilutionFraction'),
      ],
    },
    {
      title: 'In the whole drink',
      rows: [...pick('sugarG', 'acidCitricG', 'ethanolG'), standardDrinkRow(input), ...pick('energyKcal')],
    },
    { title: 'Serving', rows: pick('freezingPointC', 'washLineMm', 'headroomMl') },
  ];
}

/** The four that a phone has room for. */
export function headlineRows(input: PanelInput): PanelRow[] {
  const compared = comparedRows(input);
  const wanted = ['finalMl', 'abvFraction', 'sugarGPerL', 'acidCitricGPerL'] as const;
  return wanted.flatMap((figure) => compared.get(figure) ?? []);
}

function comparedRows(input: PanelInput): Map<ComparedFigure, PanelRow> {
  const { figures, reference, units } = input;
  const rows = figureDifferences([reference ?? figures, figures]);
  return new Map(
    rows.flatMap(({ figure, label, cells }): [ComparedFigure, PanelRow][] => {
      const cell = cells[1];
      if (cell === undefined || (cell.value === null && figure !== 'sugarAcidRatio')) return [];
      const { value, direction } = cell;
      const row: PanelRow = {
        key: figure,
        label,
        words: formatFigure({ figure, value, ...units }),
        full: formatFullFigure({ figure, value, ...units }),
        difference:
          reference === null
            ? null
            : { words: formatFigureDifference({ figure, cell, ...units }), direction },
      };
      return [[figure, row]];
    }),
  );
}

/** Volumes that follow from mass and are shown so that nobody adds millilitres: what the lines add up to, and what mixing takes. */
function volumeRows({ figures, units }: PanelInput): PanelRow[] {
  const row = (key: string, label: string, volumeMl: number): PanelRow => ({
    key,
    label,
    words: formatVolume({ volumeMl, unit: units.volumeUnit }),
    full: formatFull({ value: volumeMl, unit: 'ml' }),
    difference: null,
  });
  return [
    row('sumOfPartsMl', 'lines added up', figures.sumOfPartsMl),
    row('contractionMl', 'contraction in all', figures.contractionMl),
    row('meltWaterMl', 'melt water', figures.meltWaterMl),
    ...(figures.topMl > 0 ? [row('topMl', 'topped up', figures.topMl)] : []),
  ];
}

function standardDrinkRow({ figures, place }: PanelInput): PanelRow {
  const { name, unit } = STANDARD_DRINKS[place];
  const count = standardDrinks({ ethanolG: figures.ethanolG, place });
  return {
    key: 'standardDrinks',
    label: `${unit}s, ${name} (estimate)`,
    words: formatStandardDrinks(count),
    full: formatFull({ value: count, unit: '' }),
    difference: null,
  };
}
