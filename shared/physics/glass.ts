/**
 * The glass as a solid of revolution: its inside profile turned about the axis, in straight pieces between the points (frusta
 * of cones). Volume to a height, height of a volume, the brim, and how far ice lifts the surface.
 *
 * h height above the inside bottom [mm], r inside radius [mm], V volume [mL] = 1000 mm³. Ice floats and pushes its own mass of drink
 * aside (Archimedes); in a drink lighter than ice, its own volume. Sources: geometry (docs/sources/glass.md).
 */
import { DomainError, requireNotNegative, requireWithin } from './domain-error.ts';
import type { CalculationWarning } from './warning.ts';

export const GLASS_RANGES = {
  heightMm: { min: 0, max: 400 },
  radiusMm: { min: 0, max: 150 },
  points: { min: 2, max: 40 },
} as const;

/** Density of ice at 0 C [g/mL]; handbook value from memory, 0.9167. */
export const ICE_DENSITY_G_PER_ML = 0.9167;

const MM3_PER_ML = 1000;

/** One point of the inside profile, from the bottom to the brim. */
export interface ProfilePoint {
  readonly heightMm: number;
  readonly radiusMm: number;
}
export type Profile = readonly ProfilePoint[];

/** One straight piece of the wall. */
interface Frustum {
  readonly bottom: ProfilePoint;
  readonly heightMm: number;
  readonly topRadiusMm: number;
  readonly volumeMl: number;
}

function frustumMl(input: { heightMm: number; bottomRadiusMm: number; topRadiusMm: number }): number {
  const { heightMm: h, bottomRadiusMm: a, topRadiusMm: b } = input;
  return (Math.PI * h * (a * a + a * b + b * b)) / 3 / MM3_PER_ML;
}

/** The pieces from the bottom up. Points must rise or stay level: a level step is a shoulder, of no volume. */
function frusta(profile: Profile): Frustum[] {
  requireWithin({ quantity: 'points of the profile', value: profile.length, ...GLASS_RANGES.points });
  return profile.slice(1).map((top, index) => {
    const bottom = profile[index]!;
    requireWithin({ quantity: 'radiusMm', value: top.radiusMm, ...GLASS_RANGES.radiusMm });
    requireWithin({ quantity: 'radiusMm', value: bottom.radiusMm, ...GLASS_RANGES.radiusMm });
    requireWithin({ quantity: 'heightMm', value: bottom.heightMm, ...GLASS_RANGES.heightMm });
    const max = GLASS_RANGES.heightMm.max;
    requireWithin({ quantity: 'heightMm', value: top.heightMm, min: bottom.heightMm, max });
    const heightMm = top.heightMm - bottom.heightMm;
    const volumeMl = frustumMl({ heightMm, bottomRadiusMm: bottom.radiusMm, topRadiusMm: top.radiusMm });
    return { bottom, heightMm, topRadiusMm: top.radiusMm, volumeMl };
  });
}

/**
 * Volume of a glass to its brim.
 *
 * Formula:   sum over the pieces of pi h (a² + a b + b²) / 3
 * @param profile   inside profile from the bottom to the brim [mm]
 * @returns         volume [mL]
 * Range:     2 to 40 points, heights 0 to 400 mm and not falling, radii 0 to 150 mm
 * Accuracy:  exact for the profile; ±1 mm of radius is ±5 % of a coupe
 * Limits:    curved walls between the points are taken as straight
 * Source:    geometry of the frustum
 * @example   brimMlOfProfile([{ heightMm: 0, radiusMm: 30 }, { heightMm: 100, radiusMm: 30 }]) // 282.74
 */
export function brimMlOfProfile(profile: Profile): number {
  return frusta(profile).reduce((sum, piece) => sum + piece.volumeMl, 0);
}

/**
 * Volume of a glass up to a height.
 *
 * Formula:   whole pieces below, and pi h (a² + a r + r²) / 3 of the one that the height cuts
 * @param input.profile    inside profile from the bottom to the brim [mm]
 * @param input.heightMm   height above the lowest point [mm]
 * @returns                volume [mL]
 * Range:     height 0 to the brim; beyond the brim it is the brim volume
 * Accuracy:  exact for the profile
 * Limits:    curved walls between the points are taken as straight
 * Source:    geometry of the frustum
 * @example   volumeMlAtHeight({ profile: [{ heightMm: 0, radiusMm: 0 }, { heightMm: 60, radiusMm: 60 }], heightMm: 30 }) // 28.27
 */
export function volumeMlAtHeight(input: { profile: Profile; heightMm: number }): number {
  const height = requireNotNegative({ quantity: 'heightMm', value: input.heightMm });
  const floorMm = input.profile[0]?.heightMm ?? 0;
  return frusta(input.profile).reduce((sum, piece) => {
    const filledMm = Math.min(piece.heightMm, height + floorMm - piece.bottom.heightMm);
    if (filledMm <= 0) return sum;
    if (filledMm === piece.heightMm) return sum + piece.volumeMl;
    const slope = (piece.topRadiusMm - piece.bottom.radiusMm) / piece.heightMm;
    const topRadiusMm = piece.bottom.radiusMm + slope * filledMm;
    return sum + frustumMl({ heightMm: filledMm, bottomRadiusMm: piece.bottom.radiusMm, topRadiusMm });
  }, 0);
}

/** Height that a volume reaches within one piece: closed form, stable for a straight wall as well. */
function heightInFrustumMm(piece: Frustum, volumeMl: number): number {
  const a = piece.bottom.radiusMm;
  const slope = (piece.topRadiusMm - a) / piece.heightMm;
  const volume = (3 * volumeMl * MM3_PER_ML) / Math.PI;
  const r = Math.cbrt(Math.max(0, a ** 3 + volume * slope));
  const area = r * r + r * a + a * a;
  return area === 0 ? 0 : Math.min(piece.heightMm, volume / area);
}

export type HeightOfVolume =
  | { readonly ok: true; readonly heightMm: number }
  | {
      readonly ok: false;
      readonly reason: 'overflows';
      readonly brimMl: number;
      readonly overflowMl: number;
    };

/**
 * Height at which a volume stands in a glass.
 *
 * Formula:   within the piece where it ends, r³ = a³ + 3 V k / pi with wall slope k, and h = 3 V / (pi (r² + r a + a²))
 * @param input.profile    inside profile from the bottom to the brim [mm]
 * @param input.volumeMl   what is in the glass [mL]
 * @returns                height above the lowest point [mm], or overflows with what runs over [mL]
 * Range:     0 mL to the brim
 * Accuracy:  inverse of volumeMlAtHeight to 1e-9
 * Limits:    curved walls between the points are taken as straight; no meniscus
 * Source:    geometry of the frustum
 * @example   heightMmOfVolume({ profile: [{ heightMm: 0, radiusMm: 30 }, { heightMm: 100, radiusMm: 30 }], volumeMl: 100 }).heightMm // 35.37
 */
export function heightMmOfVolume(input: { profile: Profile; volumeMl: number }): HeightOfVolume {
  let leftMl = requireNotNegative({ quantity: 'volumeMl', value: input.volumeMl });
  const pieces = frusta(input.profile);
  const brimMl = pieces.reduce((sum, piece) => sum + piece.volumeMl, 0);
  if (leftMl > brimMl) return { ok: false, reason: 'overflows', brimMl, overflowMl: leftMl - brimMl };
  const floorMm = input.profile[0]!.heightMm;
  let heightMm = 0;
  for (const piece of pieces) {
    if (leftMl <= 0) break;
    const isFull = leftMl >= piece.volumeMl;
    const within = isFull ? piece.heightMm : heightInFrustumMm(piece, leftMl);
    heightMm = piece.bottom.heightMm - floorMm + within;
    leftMl -= isFull ? piece.volumeMl : leftMl;
  }
  return { ok: true, heightMm };
}

/**
 * Volume of drink that ice pushes aside.
 *
 * Formula:   m / rho_drink when it floats, m / 0.9167 when the drink is lighter than ice
 * @param input.iceMassG              ice in the glass [g]
 * @param input.drinkDensityGPerMl    density of the drink [g/mL]
 * @returns                           submerged volume of the ice [mL]
 * Range:     iceMassG >= 0, density above 0.7
 * Accuracy:  exact while the ice floats freely
 * Limits:    ice that stands on the bottom or wedges in the glass pushes less aside
 * Source:    Archimedes' principle
 * @example   iceDisplacementMl({ iceMassG: 100, drinkDensityGPerMl: 1 }) // 100
 */
export function iceDisplacementMl(input: { iceMassG: number; drinkDensityGPerMl: number }): number {
  const iceMassG = requireNotNegative({ quantity: 'iceMassG', value: input.iceMassG });
  const density = requireWithin({
    quantity: 'drinkDensityGPerMl',
    value: input.drinkDensityGPerMl,
    min: 0.7,
    max: 2,
  });
  return iceMassG / Math.max(density, ICE_DENSITY_G_PER_ML);
}

/** Where a drink stands in its glass; the same members as the contract's `washLine`. */
export interface WashLine {
  readonly fillMl: number;
  readonly heightMm: number;
  readonly brimMl: number;
  readonly headroomMl: number;
}

function overflowWarning(input: { fillMl: number; brimMl: number }): CalculationWarning {
  return {
    code: 'overflows',
    quantity: 'fillMl',
    value: input.fillMl,
    min: 0,
    max: input.brimMl,
    detail: 'Drink and ice are more than the glass holds to the brim.',
  };
}

/**
 * Wash line of a drink with ice in a glass.
 *
 * Formula:   height of V_drink + V_submerged ice
 * @param input.profile               inside profile from the bottom to the brim [mm]
 * @param input.drinkMl               finished drink [mL]
 * @param input.drinkDensityGPerMl    its density [g/mL]
 * @param input.iceMassG              ice in the glass [g]
 * @returns                           fill [mL], height of the surface [mm], brim [mL], what is left to it [mL, negative when it
 *                                    overflows], with a warning when it does; then the height is that of the brim
 * Range:     as brimMlOfProfile; volumes that are not negative
 * Accuracy:  exact for the profile
 * Limits:    no foam, no garnish, no meniscus; ice floats freely
 * Source:    geometry of the frustum; Archimedes' principle
 * @example   washLineOf({ profile: [{ heightMm: 0, radiusMm: 30 }, { heightMm: 100, radiusMm: 30 }], drinkMl: 100, drinkDensityGPerMl: 1, iceMassG: 0 }).washLine.headroomMl // 182.74
 */
export function washLineOf(input: {
  profile: Profile;
  drinkMl: number;
  drinkDensityGPerMl: number;
  iceMassG: number;
}): { washLine: WashLine; warnings: CalculationWarning[] } {
  const { profile, iceMassG, drinkDensityGPerMl } = input;
  const drinkMl = requireNotNegative({ quantity: 'drinkMl', value: input.drinkMl });
  const fillMl = drinkMl + iceDisplacementMl({ iceMassG, drinkDensityGPerMl });
  const brimMl = brimMlOfProfile(profile);
  const height = heightMmOfVolume({ profile, volumeMl: Math.min(fillMl, brimMl) });
  if (!height.ok) throw new DomainError({ quantity: 'fillMl', value: fillMl, min: 0, max: brimMl });
  return {
    washLine: { fillMl, heightMm: height.heightMm, brimMl, headroomMl: brimMl - fillMl },
    warnings: fillMl > brimMl ? [overflowWarning({ fillMl, brimMl })] : [],
  };
}
