/**
 * The outline of a glass on paper, from its inside profile. Millimetres: x from the axis to the right, y from the inside bottom
 * upwards; the drawing turns y over and scales.
 */
import type { Profile, ProfilePoint } from '#shared/physics/glass.ts';

export interface Point {
  readonly x: number;
  readonly y: number;
}

/** A glass that can be drawn; a contract's `Glass`, `GlassWrite` and `GlassSnapshot` all are. */
export interface DrawnGlass {
  readonly name: string;
  readonly profile: Profile;
  readonly stemMm: number;
}

/** A bend sharper than this is an edge of the glass; a gentler one is a curve through measured points. */
const SHARPEST_CURVE_DEGREES = 30;
const STEM_HALF_WIDTH_MM = 3;
const SHORT_STEM_MM = 30;
const SHORT_STEM_HALF_WIDTH_MM = 9;
const FOOT_THICKNESS_MM = 2;
const SMALLEST_FOOT_HALF_WIDTH_MM = 24;
const FOOT_TO_BOWL = 0.66;

/** The same profile measured from its own lowest point. */
function fromFloor(profile: Profile): ProfilePoint[] {
  const floorMm = profile[0]?.heightMm ?? 0;
  return profile.map(({ heightMm, radiusMm }) => ({ heightMm: heightMm - floorMm, radiusMm }));
}

export function insideHeightMm(profile: Profile): number {
  return fromFloor(profile).at(-1)?.heightMm ?? 0;
}

export function widestRadiusMm(profile: Profile): number {
  return Math.max(0, ...profile.map((point) => point.radiusMm));
}

/** Inside radius at a height, between the points as straight as the calculation takes it. */
export function radiusMmAtHeight(input: { profile: Profile; heightMm: number }): number {
  const points = fromFloor(input.profile);
  const above = points.findIndex((point) => point.heightMm >= input.heightMm);
  const upper = points[above < 0 ? points.length - 1 : above];
  const lower = points[above - 1] ?? upper;
  if (upper === undefined || lower === undefined) return 0;
  const rise = upper.heightMm - lower.heightMm;
  const share = rise === 0 ? 1 : (input.heightMm - lower.heightMm) / rise;
  return lower.radiusMm + Math.min(1, Math.max(0, share)) * (upper.radiusMm - lower.radiusMm);
}

/** Left brim, down to the bottom, up to the right brim. A pointed bottom is one point. */
function wallPoints(profile: Profile): Point[] {
  const right = fromFloor(profile).map(({ heightMm, radiusMm }) => ({ x: radiusMm, y: heightMm }));
  const left = right.map(({ x, y }) => ({ x: -x, y })).reverse();
  return right[0]?.x === 0 ? [...left, ...right.slice(1)] : [...left, ...right];
}

interface Segment {
  readonly lengthMm: number;
  readonly direction: Point;
}

function segmentBetween(from: Point, to: Point): Segment {
  const lengthMm = Math.hypot(to.x - from.x, to.y - from.y);
  const unit = lengthMm === 0 ? 1 : lengthMm;
  return { lengthMm, direction: { x: (to.x - from.x) / unit, y: (to.y - from.y) / unit } };
}

/** Direction of the wall where two pieces meet; undefined at an edge, where each keeps its own. */
function tangentBetween(before: Segment, after: Segment): Point | undefined {
  const cosine = before.direction.x * after.direction.x + before.direction.y * after.direction.y;
  if (cosine < Math.cos((SHARPEST_CURVE_DEGREES * Math.PI) / 180)) return undefined;
  const x = before.direction.x * after.lengthMm + after.direction.x * before.lengthMm;
  const y = before.direction.y * after.lengthMm + after.direction.y * before.lengthMm;
  const length = Math.hypot(x, y);
  return length === 0 ? undefined : { x: x / length, y: y / length };
}

/** Turns millimetres into the drawing's own coordinates. */
export type ToPaper = (point: Point) => Point;

function written(point: Point): string {
  return `${point.x.toFixed(2)} ${point.y.toFixed(2)}`;
}

/** The inside wall from brim to brim as an SVG path, curved where the points follow a curve. */
export function wallPath(input: { profile: Profile; toPaper: ToPaper }): string {
  const points = wallPoints(input.profile);
  const segments = points.slice(1).map((point, index) => segmentBetween(points[index]!, point));
  const curves = segments.map(({ lengthMm, direction }, index) => {
    const [start, end] = [points[index]!, points[index + 1]!];
    const [before, after] = [segments[index - 1], segments[index + 1]];
    const leaving = (before && tangentBetween(before, segments[index]!)) ?? direction;
    const arriving = (after && tangentBetween(segments[index]!, after)) ?? direction;
    const reach = lengthMm / 3;
    const handles = [
      { x: start.x + leaving.x * reach, y: start.y + leaving.y * reach },
      { x: end.x - arriving.x * reach, y: end.y - arriving.y * reach },
      end,
    ];
    return `C ${handles.map((point) => written(input.toPaper(point))).join(', ')}`;
  });
  const [first] = points;
  return first === undefined ? '' : `M ${written(input.toPaper(first))} ${curves.join(' ')}`;
}

/** Half the width of the foot; 0 for a glass that stands on its own bottom. */
export function footHalfWidthMm(glass: DrawnGlass): number {
  if (glass.stemMm === 0) return 0;
  return Math.max(SMALLEST_FOOT_HALF_WIDTH_MM, FOOT_TO_BOWL * widestRadiusMm(glass.profile));
}

/** Stem and foot below the bowl; empty for a glass without. */
export function stemPath(input: { glass: DrawnGlass; toPaper: ToPaper }): string {
  const { glass } = input;
  if (glass.stemMm === 0) return '';
  const isShort = glass.stemMm < SHORT_STEM_MM;
  const stem = isShort ? SHORT_STEM_HALF_WIDTH_MM : STEM_HALF_WIDTH_MM;
  const foot = footHalfWidthMm(glass);
  const footTop = -glass.stemMm + Math.min(FOOT_THICKNESS_MM, glass.stemMm / 2);
  const right: Point[] = [
    { x: stem, y: 0 },
    { x: stem * 0.7, y: footTop * 0.5 },
    { x: stem, y: footTop + 2 * (isShort ? 0.5 : 1) },
    { x: foot, y: footTop },
    { x: foot, y: -glass.stemMm },
  ];
  const outline = [...right, ...right.map(({ x, y }) => ({ x: -x, y })).reverse()];
  return `M ${outline.map((point) => written(input.toPaper(point))).join(' L ')} Z`;
}
