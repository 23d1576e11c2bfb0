/** Pieces of ice as they lie in the section of a glass: floating, a tenth of the top row above the surface. */
import { ICE_DENSITY_G_PER_ML, type Profile } from '#shared/physics/glass.ts';
import type { GlassIce } from './glass-contents.ts';
import { radiusMmAtHeight } from './glass-outline.ts';

/** A square piece by its centre, in millimetres from the axis and the inside bottom. */
export interface IcePiece {
  readonly x: number;
  readonly y: number;
  readonly sideMm: number;
  readonly angleDegrees: number;
}

const SIDES_MM = { cubes: 26, crushed: 8 } as const;
/** A section shows a slice: more pieces than this add nothing to the picture. */
const MOST_PIECES = { cubes: 12, crushed: 48 } as const;
const ABOVE_SURFACE = 0.1;
const CLEARANCE_MM = 2;
const SPACING = 1.08;
/** Ice lies askew; the same for every drawing, so that nothing moves without a reason. */
const ANGLES_DEGREES = [-11, 8, 17, -5, 12, -16, 4, -8] as const;
const MM3_PER_ML = 1000;

export function icePieces(input: { profile: Profile; ice: GlassIce; surfaceMm: number }): IcePiece[] {
  const { ice } = input;
  if (ice.kind === 'none' || ice.massG <= 0) return [];
  if (ice.kind === 'block') return [block(input)];
  const sideMm = SIDES_MM[ice.kind];
  const pieceMassG = (sideMm ** 3 / MM3_PER_ML) * ICE_DENSITY_G_PER_ML;
  const count = Math.max(1, Math.min(MOST_PIECES[ice.kind], Math.round(ice.massG / pieceMassG)));
  return rowsOfPieces({ ...input, sideMm, count });
}

function block(input: { profile: Profile; ice: GlassIce; surfaceMm: number }): IcePiece {
  const { profile, ice, surfaceMm } = input;
  const wantedMm = Math.cbrt((ice.massG / ICE_DENSITY_G_PER_ML) * MM3_PER_ML);
  const insideMm = 2 * radiusMmAtHeight({ profile, heightMm: surfaceMm / 2 }) - 2 * CLEARANCE_MM;
  const sideMm = Math.max(1, Math.min(wantedMm, insideMm));
  return { x: 0, y: surfaceMm + sideMm * (ABOVE_SURFACE - 0.5), sideMm, angleDegrees: -4 };
}

function rowsOfPieces(input: {
  profile: Profile;
  surfaceMm: number;
  sideMm: number;
  count: number;
}): IcePiece[] {
  const { profile, surfaceMm, sideMm, count } = input;
  const pieces: IcePiece[] = [];
  const step = sideMm * SPACING;
  for (let row = 0; pieces.length < count; row += 1) {
    const y = surfaceMm + sideMm * (ABOVE_SURFACE - 0.5) - row * step;
    if (y < sideMm * 0.5 && row > 0) break;
    const lowestMm = Math.max(0, y - sideMm / 2);
    const insideMm = 2 * radiusMmAtHeight({ profile, heightMm: lowestMm }) - 2 * CLEARANCE_MM;
    const inRow = Math.min(count - pieces.length, Math.max(1, Math.floor(insideMm / step)));
    for (let column = 0; column < inRow; column += 1) {
      const angleDegrees = ANGLES_DEGREES[(row * 3 + column) % ANGLES_DEGREES.length] ?? 0;
      pieces.push({ x: (column - (inRow - 1) / 2) * step, y, sideMm, angleDegrees });
    }
  }
  return pieces;
}
