export const GLASS_RANGES = {
  heightMm: { min: 0, max: 400 },
  radiusMm: { min: 0, max: 150 },
  points: { min: 2, max: 40 },
} as const;
