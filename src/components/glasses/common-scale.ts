import { glassSizeMm } from '#src/components/drawing/glass-drawing.ts';
import type { DrawnGlass } from '#src/components/drawing/glass-outline.ts';

/** The largest scale at which every one of the glasses fits into the same room. */
export function commonScale(input: {
  glasses: readonly DrawnGlass[];
  widthPx: number;
  heightPx: number;
}): number {
  const scales = input.glasses.map((glass) => {
    const { widthMm, heightMm } = glassSizeMm(glass);
    return Math.min(input.widthPx / Math.max(1, widthMm), input.heightPx / Math.max(1, heightMm));
  });
  return Math.min(...scales, input.heightPx);
}
