export const METHODS = ['shake', 'stir', 'build', 'throw', 'swizzle', 'blend', 'pre-batch'] as const;
export type Method = (typeof METHODS)[number];

export const DILUTION_RANGES = {
  /** Melt water ÷ undiluted volume, set by hand. */
  dilutionFraction: { min: 0, max: 3 },
  massG: { exclusiveMin: 0, max: 100_000 },
} as const;
