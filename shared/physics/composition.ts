/**
 * What a liquid is made of, per litre at 20 C, and the limits within which such a statement makes sense.
 *
 * Concentrations are referred to the whole liquid, as a label or a laboratory states them. Acids are total acid,
 * salts counted as free acid.
 */

/** Acids told apart by the calculations, in the order they are shown. */
export const ACID_KEYS = [
  'citric',
  'malic',
  'tartaric',
  'lactic',
  'acetic',
  'phosphoric',
  'succinic',
  'ascorbic',
] as const;
export type AcidKey = (typeof ACID_KEYS)[number];

/** Acid concentrations by species [g/L]; an acid that is not named is absent. */
export type AcidsGPerL = Readonly<Partial<Record<AcidKey, number>>>;

export interface Composition {
  /** Ethanol volume at 20 C per volume of liquid at 20 C [0 to 1]. */
  readonly abvFraction: number;
  /** Dissolved sugars as present, counted as sucrose for density [g/L]. */
  readonly sugarGPerL: number;
  readonly acidsGPerL: AcidsGPerL;
  /** Density at 20 C where it was measured [g/mL]; null has it computed from the rest. */
  readonly densityGPerMl: number | null;
}

/** Limits of a physical composition: the same numbers serve input fields, contracts and property tests. */
export const COMPOSITION_RANGES = {
  abvFraction: { min: 0, max: 1 },
  /** Saturated sucrose at 25 C is about 905 g/L; invert syrups reach about 1150 g/L. */
  sugarGPerL: { min: 0, max: 1200 },
  /** Strong stock solutions: saturated citric acid is about 800 g/L. */
  acidGPerL: { min: 0, max: 900 },
  densityGPerMl: { min: 0.78, max: 1.8 },
} as const;
