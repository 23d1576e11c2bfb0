/**
 * What stands in a glass: the layers of liquid as shares of the fill, the surface, what runs over, and where another volume or a
 * tolerance would stand. The liquids mix in truth; the layers show how much of the fill each of them is.
 */
import type { Figures } from '#shared/contracts/version.ts';
import type { SpecBody } from '#shared/contracts/spec.ts';
import { type Profile, type WashLine, heightMmOfVolume, washLineOf } from '#shared/physics/glass.ts';
import { insideHeightMm, radiusMmAtHeight } from './glass-outline.ts';

/** What the drawing needs of a drink; `Figures` has it all. Without a wash line it is worked out for the glass. */
export type DrawnDrink = Pick<
  Figures,
  'undilutedMl' | 'meltWaterMl' | 'topMl' | 'finalMl' | 'densityGPerMl' | 'washLine'
>;

export type GlassIce = SpecBody['glassIce'];

export type LiquidPart = 'undiluted' | 'melt' | 'top';

export interface LiquidLayer {
  readonly part: LiquidPart;
  readonly volumeMl: number;
  readonly fromMm: number;
  readonly toMm: number;
}

export interface GlassContents {
  readonly washLine: WashLine;
  readonly layers: readonly LiquidLayer[];
  /** What does not fit [mL]; 0 when all does. */
  readonly overflowMl: number;
  /** How high the drink would stand over the brim if the wall went straight up, for the drawing [mm]. */
  readonly overflowMm: number;
}

const MM3_PER_ML = 1000;
/** The column over the brim is not drawn higher, however much runs over. */
const MAX_OVERFLOW_MM = 30;

/** Height of a volume in the glass, at most the brim. */
export function heightMmInGlass(input: { profile: Profile; volumeMl: number }): number {
  const height = heightMmOfVolume({ profile: input.profile, volumeMl: Math.max(0, input.volumeMl) });
  return height.ok ? height.heightMm : insideHeightMm(input.profile);
}

export function glassContents(input: {
  profile: Profile;
  drink: DrawnDrink;
  ice: GlassIce | null;
}): GlassContents {
  const { profile, drink } = input;
  const washLine = drink.washLine ?? ownWashLine(input);
  const overflowMl = Math.max(0, -washLine.headroomMl);
  return {
    washLine,
    layers: liquidLayers({ profile, drink, fillMl: Math.min(washLine.fillMl, washLine.brimMl) }),
    overflowMl,
    overflowMm: overflowHeightMm({ profile, overflowMl }),
  };
}

function ownWashLine(input: { profile: Profile; drink: DrawnDrink; ice: GlassIce | null }): WashLine {
  return washLineOf({
    profile: input.profile,
    drinkMl: input.drink.finalMl,
    drinkDensityGPerMl: input.drink.densityGPerMl,
    iceMassG: input.ice === null || input.ice.kind === 'none' ? 0 : input.ice.massG,
  }).washLine;
}

function liquidLayers(input: { profile: Profile; drink: DrawnDrink; fillMl: number }): LiquidLayer[] {
  const { profile, drink, fillMl } = input;
  const parts = [
    { part: 'undiluted', volumeMl: drink.undilutedMl },
    { part: 'melt', volumeMl: drink.meltWaterMl },
    { part: 'top', volumeMl: drink.topMl },
  ] as const;
  const sumMl = parts.reduce((sum, { volumeMl }) => sum + volumeMl, 0);
  if (sumMl <= 0) return [];
  let belowMl = 0;
  return parts.flatMap(({ part, volumeMl }) => {
    if (volumeMl <= 0) return [];
    const fromMm = heightMmInGlass({ profile, volumeMl: (belowMl / sumMl) * fillMl });
    belowMl += volumeMl;
    const toMm = heightMmInGlass({ profile, volumeMl: (belowMl / sumMl) * fillMl });
    return [{ part, volumeMl, fromMm, toMm }];
  });
}

function overflowHeightMm(input: { profile: Profile; overflowMl: number }): number {
  if (input.overflowMl === 0) return 0;
  const radiusMm = radiusMmAtHeight({ profile: input.profile, heightMm: insideHeightMm(input.profile) });
  const areaMm2 = Math.PI * radiusMm * radiusMm;
  return areaMm2 === 0 ? 0 : Math.min(MAX_OVERFLOW_MM, (input.overflowMl * MM3_PER_ML) / areaMm2);
}

export interface HeightBand {
  readonly fromMm: number;
  readonly toMm: number;
}

/** Where the surface may stand when the pour is so much more or less. */
export function toleranceBand(input: {
  profile: Profile;
  washLine: WashLine;
  toleranceMl: number;
}): HeightBand {
  const { profile, washLine, toleranceMl } = input;
  return {
    fromMm: heightMmInGlass({ profile, volumeMl: washLine.fillMl - toleranceMl }),
    toMm: heightMmInGlass({ profile, volumeMl: washLine.fillMl + toleranceMl }),
  };
}
