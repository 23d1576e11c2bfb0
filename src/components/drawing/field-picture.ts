/** The balance field in pixels: axes, rays of equal sugar : acid, trails, marks and their labels. */
import { type BalanceExtent, balanceExtent, ratioRays } from '#shared/specs/balance.ts';
import { formatTrimmed } from '#shared/text/format-number.ts';
import { type FieldContents, type FieldMark, type FieldUncertainty, fieldMarks } from './field-marks.ts';
import type { Point } from './glass-outline.ts';
import {
  type Box,
  LABEL_HEIGHT_PX,
  type PlacedLabel,
  labelWidthPx,
  overlaps,
  placeLabels,
} from './label-placement.ts';

export interface FieldPictureInput extends FieldContents {
  readonly widthPx: number;
  readonly heightPx: number;
  /** The point that is pointed at, whose name is shown. */
  readonly activeKey: string | null;
}

export interface DrawnMark extends FieldMark, Point {}

export interface DrawnRay {
  readonly ratio: number;
  readonly from: Point;
  readonly to: Point;
  /** null where another label stands. */
  readonly label: (Point & { readonly text: string; readonly anchor: 'start' | 'middle' }) | null;
}

export interface Tick {
  readonly value: number;
  readonly text: string;
  readonly at: number;
}

export interface Ellipse extends Point {
  readonly rx: number;
  readonly ry: number;
  readonly angleDegrees: number;
}

export interface FieldPicture {
  readonly plot: Box;
  readonly acidTicks: readonly Tick[];
  readonly sugarTicks: readonly Tick[];
  readonly rays: readonly DrawnRay[];
  readonly trails: readonly { readonly trail: string; readonly path: string }[];
  readonly marks: readonly DrawnMark[];
  readonly labels: readonly PlacedLabel[];
  readonly ellipse: Ellipse | null;
}

const MARGIN_PX = { top: 24, right: 44, bottom: 40, left: 44 } as const;
const MARK_RADIUS_PX = 7;
const REFERENCE_RADIUS_PX = 4;
const RAY_LABEL_OFFSET_PX = 6;
const PRIORITY = { live: 4, ghost: 3, version: 2, reference: 1 } as const;
/** About so many steps on an axis. */
const WANTED_STEPS = 5;
const STEPS = [1, 2, 5] as const;

export function fieldPicture(input: FieldPictureInput): FieldPicture {
  const marks = fieldMarks(input);
  const extent = balanceExtent(marks);
  const plot = {
    x: MARGIN_PX.left,
    y: MARGIN_PX.top,
    width: input.widthPx - MARGIN_PX.left - MARGIN_PX.right,
    height: input.heightPx - MARGIN_PX.top - MARGIN_PX.bottom,
  };
  const toPaper = paperOf({ plot, extent });
  const drawn = marks.map((mark) => ({ ...mark, ...toPaper(mark) }));
  const live = input.live?.uncertainty ?? null;
  return {
    plot,
    acidTicks: ticksOf(extent.maxAcidCitricGPerL).map((value) => ({
      value,
      text: formatTrimmed({ value, decimals: 1 }),
      at: toPaper({ acidCitricGPerL: value, sugarGPerL: 0 }).x,
    })),
    sugarTicks: ticksOf(extent.maxSugarGPerL).map((value) => ({
      value,
      text: formatTrimmed({ value, decimals: 1 }),
      at: toPaper({ acidCitricGPerL: 0, sugarGPerL: value }).y,
    })),
    rays: drawnRays({ extent, toPaper, plot }),
    trails: trailsOf(drawn),
    marks: drawn,
    labels: labelsOf({ drawn, plot, activeKey: input.activeKey }),
    ellipse:
      input.live === null || live === null
        ? null
        : ellipseOf({ centre: toPaper(input.live), uncertainty: live, toPaper }),
  };
}

type Place = Pick<FieldMark, 'acidCitricGPerL' | 'sugarGPerL'>;
type ToPaper = (place: Place) => Point;

function paperOf(input: { plot: Box; extent: BalanceExtent }): ToPaper {
  const { plot, extent } = input;
  return ({ acidCitricGPerL, sugarGPerL }) => ({
    x: plot.x + (acidCitricGPerL / extent.maxAcidCitricGPerL) * plot.width,
    y: plot.y + (1 - sugarGPerL / extent.maxSugarGPerL) * plot.height,
  });
}

/** Round values from 0 to the end of an axis. */
export function ticksOf(end: number): number[] {
  const rough = end / WANTED_STEPS;
  const magnitude = 10 ** Math.floor(Math.log10(rough));
  const step = (STEPS.find((each) => each * magnitude >= rough) ?? 10) * magnitude;
  return Array.from({ length: Math.floor(end / step + 1e-9) + 1 }, (_, index) => index * step);
}

function drawnRays(input: { extent: BalanceExtent; toPaper: ToPaper; plot: Box }): DrawnRay[] {
  const { extent, toPaper, plot } = input;
  const from = toPaper({ acidCitricGPerL: 0, sugarGPerL: 0 });
  const taken: Box[] = [];
  return ratioRays({ extent }).map(({ ratio, end }) => {
    const to = toPaper(end);
    const text = `${ratio} : 1`;
    const isAtTop = to.y <= plot.y + 1;
    const width = labelWidthPx(text);
    const box = isAtTop
      ? { x: to.x - width / 2, y: plot.y - LABEL_HEIGHT_PX - 2, width, height: LABEL_HEIGHT_PX }
      : { x: to.x + RAY_LABEL_OFFSET_PX, y: to.y - LABEL_HEIGHT_PX / 2, width, height: LABEL_HEIGHT_PX };
    const isFree = !taken.some((other) => overlaps(box, other));
    if (isFree) taken.push(box);
    const anchor = isAtTop ? ('middle' as const) : ('start' as const);
    const at = isAtTop
      ? { x: to.x, y: plot.y - RAY_LABEL_OFFSET_PX }
      : { x: to.x + RAY_LABEL_OFFSET_PX, y: to.y + 4 };
    return { ratio, from, to, label: isFree ? { ...at, text, anchor } : null };
  });
}

function trailsOf(drawn: readonly DrawnMark[]): FieldPicture['trails'] {
  const names = [...new Set(drawn.flatMap((mark) => mark.trail ?? []))];
  return names.map((trail) => ({
    trail,
    path: drawn
      .filter((mark) => mark.trail === trail)
      .map(({ x, y }, index) => `${index === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`)
      .join(' '),
  }));
}

function labelsOf(input: {
  drawn: readonly DrawnMark[];
  plot: Box;
  activeKey: string | null;
}): PlacedLabel[] {
  const { drawn, plot, activeKey } = input;
  const labels = drawn.flatMap(({ key, kind, label, name, x, y }) => {
    const isActive = key === activeKey;
    const text = isActive ? name : label;
    return text === '' ? [] : [{ key, text, x, y, priority: isActive ? 5 : PRIORITY[kind] }];
  });
  const obstacles = drawn.map(({ kind, x, y }) => {
    const radius = kind === 'reference' ? REFERENCE_RADIUS_PX : MARK_RADIUS_PX;
    return { x: x - radius, y: y - radius, width: 2 * radius, height: 2 * radius };
  });
  return placeLabels({ labels, obstacles, bounds: plot });
}

/** The ellipse of two half axes and their correlation, turned as the paper shows it. */
function ellipseOf(input: { centre: Point; uncertainty: FieldUncertainty; toPaper: ToPaper }): Ellipse {
  const { centre, uncertainty, toPaper } = input;
  const origin = toPaper({ acidCitricGPerL: 0, sugarGPerL: 0 });
  const corner = toPaper(uncertainty);
  const sx = corner.x - origin.x;
  const sy = origin.y - corner.y;
  const [xx, yy, xy] = [sx * sx, sy * sy, -uncertainty.correlation * sx * sy];
  const middle = (xx + yy) / 2;
  const half = Math.hypot((xx - yy) / 2, xy);
  return {
    ...centre,
    rx: Math.sqrt(Math.max(0, middle + half)),
    ry: Math.sqrt(Math.max(0, middle - half)),
    angleDegrees: (Math.atan2(2 * xy, xx - yy) / 2) * (180 / Math.PI),
  };
}
