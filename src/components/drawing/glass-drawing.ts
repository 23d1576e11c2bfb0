/** Everything a drawing of a glass consists of, in pixels, from the glass and what is in it. */
import { brimMlOfProfile } from '#shared/physics/glass.ts';
import { type VolumeUnit, formatLength, formatVolume } from '#shared/text/format-quantity.ts';
import {
  type DrawnDrink,
  type GlassContents,
  type GlassIce,
  type LiquidPart,
  glassContents,
  heightMmInGlass,
  toleranceBand,
} from './glass-contents.ts';
import { icePieces } from './glass-ice.ts';
import {
  type DrawnGlass,
  type Point,
  footHalfWidthMm,
  insideHeightMm,
  radiusMmAtHeight,
  stemPath,
  wallPath,
  widestRadiusMm,
} from './glass-outline.ts';
import {
  type GlassGhost,
  PART_NAMES,
  type PourTolerance,
  glassDescription,
  glassTitle,
  overflowWords,
} from './glass-words.ts';
import { spreadLabels } from './label-column.ts';

export interface GlassDrawingInput {
  readonly glass: DrawnGlass;
  readonly drink: DrawnDrink | null;
  readonly ice: GlassIce | null;
  readonly ghost: GlassGhost | null;
  readonly tolerance: PourTolerance | null;
  readonly volumeUnit: VolumeUnit;
  /** Given for several glasses to one scale; else as large as the bounds allow. */
  readonly pxPerMm: number | null;
  readonly maxWidthPx: number;
  readonly maxHeightPx: number;
  readonly hasLabels: boolean;
}

/** A rectangle across the glass. */
export interface Band {
  readonly y: number;
  readonly height: number;
}

export interface DrawnLabel {
  readonly key: string;
  readonly text: string;
  readonly isStrong: boolean;
  /** Where the text stands. */
  readonly y: number;
  /** What it points at. */
  readonly from: Point;
}

export interface DrawnPiece {
  readonly x: number;
  readonly y: number;
  readonly side: number;
  readonly angleDegrees: number;
}

export interface GlassPicture {
  readonly pxPerMm: number;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly axisX: number;
  readonly leftX: number;
  readonly rightX: number;
  readonly brimY: number;
  readonly brimHalfWidth: number;
  readonly wall: string;
  readonly stem: string;
  readonly layers: readonly (Band & { readonly part: LiquidPart })[];
  readonly surface: { readonly y: number; readonly halfWidth: number } | null;
  readonly overflow: Band | null;
  readonly overflowText: string | null;
  readonly ice: readonly DrawnPiece[];
  readonly ghost: { readonly y: number; readonly halfWidth: number } | null;
  readonly tolerance: Band | null;
  readonly labels: readonly DrawnLabel[];
  readonly labelX: number;
  readonly title: string;
  readonly description: string;
}

const PADDING_PX = 8;
const LABEL_COLUMN_PX = 148;
const LABEL_GAP_PX = 18;
const LABEL_OFFSET_PX = 16;

/** How much room a glass takes [mm]. */
export function glassSizeMm(glass: DrawnGlass): { widthMm: number; heightMm: number } {
  return {
    widthMm: 2 * Math.max(widestRadiusMm(glass.profile), footHalfWidthMm(glass)),
    heightMm: insideHeightMm(glass.profile) + glass.stemMm,
  };
}

/** Largest scale at which a glass fits into the bounds. */
function fittingScale(input: GlassDrawingInput): number {
  const { widthMm, heightMm } = glassSizeMm(input.glass);
  const labelsPx = input.hasLabels ? LABEL_COLUMN_PX : 0;
  return Math.max(
    0.1,
    Math.min(
      (input.maxWidthPx - 2 * PADDING_PX - labelsPx) / Math.max(1, widthMm),
      (input.maxHeightPx - 2 * PADDING_PX) / Math.max(1, heightMm),
    ),
  );
}

export function glassPicture(input: GlassDrawingInput): GlassPicture {
  const { glass, drink, ice, volumeUnit } = input;
  const { profile } = glass;
  const pxPerMm = input.pxPerMm ?? fittingScale(input);
  const size = glassSizeMm(glass);
  const insideMm = insideHeightMm(profile);
  const contents = drink === null ? null : glassContents({ profile, drink, ice });
  const overflowMm = contents?.overflowMm ?? 0;
  const axisX = PADDING_PX + (size.widthMm / 2) * pxPerMm;
  const brimY = PADDING_PX + overflowMm * pxPerMm;
  const toPaper = (point: Point): Point => ({
    x: axisX + point.x * pxPerMm,
    y: brimY + (insideMm - point.y) * pxPerMm,
  });
  const yOf = (heightMm: number): number => toPaper({ x: 0, y: heightMm }).y;
  const halfWidthAt = (heightMm: number): number => radiusMmAtHeight({ profile, heightMm }) * pxPerMm;
  const bandOf = ({ fromMm, toMm }: { fromMm: number; toMm: number }): Band => ({
    y: yOf(toMm),
    height: Math.max(0, yOf(fromMm) - yOf(toMm)),
  });

  const surfaceMm = contents?.washLine.heightMm ?? 0;
  const ghostMm = input.ghost === null ? null : heightMmInGlass({ profile, volumeMl: input.ghost.finalMl });
  const tolerance = contents === null ? null : input.tolerance;
  const pieces = ice === null || contents === null ? [] : icePieces({ profile, ice, surfaceMm });
  const picture = {
    pxPerMm,
    axisX,
    brimY,
    leftX: axisX - (size.widthMm / 2) * pxPerMm,
    rightX: axisX + (size.widthMm / 2) * pxPerMm,
    brimHalfWidth: halfWidthAt(insideMm),
    wall: wallPath({ profile, toPaper }),
    stem: stemPath({ glass, toPaper }),
    layers: (contents?.layers ?? []).map((layer) => ({ part: layer.part, ...bandOf(layer) })),
    surface: contents === null ? null : { y: yOf(surfaceMm), halfWidth: halfWidthAt(surfaceMm) },
    overflow: overflowMm > 0 ? bandOf({ fromMm: insideMm, toMm: insideMm + overflowMm }) : null,
    overflowText:
      contents !== null && contents.overflowMl > 0
        ? overflowWords({ overflowMl: contents.overflowMl, volumeUnit })
        : null,
    ice: pieces.map((piece) => ({
      ...toPaper(piece),
      side: piece.sideMm * pxPerMm,
      angleDegrees: piece.angleDegrees,
    })),
    ghost: ghostMm === null ? null : { y: yOf(ghostMm), halfWidth: halfWidthAt(ghostMm) },
    tolerance:
      tolerance === null || contents === null
        ? null
        : bandOf(toleranceBand({ profile, washLine: contents.washLine, ...tolerance })),
    labelX: axisX + (size.widthMm / 2) * pxPerMm + LABEL_OFFSET_PX,
  };
  const heightPx = brimY + size.heightMm * pxPerMm + PADDING_PX;
  const words = { ...input, tolerance, brimMl: brimMlOfProfile(profile), contents };
  const finalMl = drink?.finalMl ?? null;
  return {
    ...picture,
    widthPx: picture.rightX + PADDING_PX + (input.hasLabels ? LABEL_COLUMN_PX : 0),
    heightPx,
    labels: input.hasLabels ? placedLabels({ ...words, yOf, halfWidthAt, axisX, insideMm, heightPx }) : [],
    title: glassTitle({ glass, finalMl, volumeUnit }),
    description: glassDescription({ ...words, finalMl }),
  };
}

interface LabelsInput extends GlassDrawingInput {
  readonly brimMl: number;
  readonly contents: GlassContents | null;
  readonly yOf: (heightMm: number) => number;
  readonly halfWidthAt: (heightMm: number) => number;
  readonly axisX: number;
  readonly insideMm: number;
  readonly heightPx: number;
}

interface WantedLabel {
  readonly key: string;
  readonly text: string;
  readonly heightMm: number;
  readonly isStrong?: boolean;
}

function placedLabels(input: LabelsInput): DrawnLabel[] {
  const wanted = wantedLabels(input);
  const ys = spreadLabels({
    places: wanted.map(({ heightMm }) => input.yOf(heightMm)),
    gap: LABEL_GAP_PX,
    min: PADDING_PX + 2,
    max: input.heightPx - PADDING_PX,
  });
  return wanted.map(({ key, text, heightMm, isStrong = false }, index) => ({
    key,
    text,
    isStrong,
    y: ys[index] ?? 0,
    from: { x: input.axisX + input.halfWidthAt(heightMm), y: input.yOf(heightMm) },
  }));
}

function wantedLabels(input: LabelsInput): WantedLabel[] {
  const { contents, insideMm, volumeUnit: unit } = input;
  const volume = (volumeMl: number): string => formatVolume({ volumeMl, unit });
  const brim = { key: 'brim', text: `brim ${volume(input.brimMl)}`, heightMm: insideMm };
  if (contents === null) return [brim];
  const { washLine, layers, overflowMl } = contents;
  const surface: WantedLabel[] =
    overflowMl > 0
      ? [
          {
            key: 'overflow',
            text: `${volume(overflowMl)} too much`,
            heightMm: insideMm + contents.overflowMm,
            isStrong: true,
          },
        ]
      : [
          {
            key: 'headroom',
            text: `${volume(washLine.headroomMl)} to the brim`,
            heightMm: (insideMm + washLine.heightMm) / 2,
          },
          {
            key: 'wash-line',
            text: `wash line ${formatLength(washLine.heightMm)}`,
            heightMm: washLine.heightMm,
            isStrong: true,
          },
        ];
  return [brim, ...surface, ...layerLabels({ layers, volume }), ...ghostLabel(input)];
}

function layerLabels(input: {
  layers: GlassContents['layers'];
  volume: (volumeMl: number) => string;
}): WantedLabel[] {
  return input.layers.map(({ part, volumeMl, fromMm, toMm }) => ({
    key: part,
    text: `${PART_NAMES[part]} ${input.volume(volumeMl)}`,
    heightMm: (fromMm + toMm) / 2,
  }));
}

function ghostLabel(input: LabelsInput): WantedLabel[] {
  const { ghost, glass, volumeUnit } = input;
  if (ghost === null) return [];
  const heightMm = heightMmInGlass({ profile: glass.profile, volumeMl: ghost.finalMl });
  const text = `${ghost.name} ${formatVolume({ volumeMl: ghost.finalMl, unit: volumeUnit })}`;
  return [{ key: 'ghost', text, heightMm }];
}
