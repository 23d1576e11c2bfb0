/** Places labels beside their points so that none covers another label or a point. */

export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

export interface LabelToPlace {
  readonly key: string;
  readonly text: string;
  /** The point it belongs to [px]. */
  readonly x: number;
  readonly y: number;
  /** Labels that matter most are placed first. */
  readonly priority: number;
}

export interface PlacedLabel extends LabelToPlace {
  /** Upper left corner of the text. */
  readonly box: Box;
}

export const LABEL_HEIGHT_PX = 16;
/** Roboto's digits and lower-case letters at 12 px are about this wide on average. */
const CHARACTER_WIDTH_PX = 6.6;
const NEAR_PX = 8;
const FAR_PX = 22;

export function labelWidthPx(text: string): number {
  return text.length * CHARACTER_WIDTH_PX + 2;
}

export function overlaps(one: Box, other: Box): boolean {
  return (
    one.x < other.x + other.width &&
    other.x < one.x + one.width &&
    one.y < other.y + other.height &&
    other.y < one.y + one.height
  );
}

function isInside(box: Box, bounds: Box): boolean {
  return (
    box.x >= bounds.x &&
    box.y >= bounds.y &&
    box.x + box.width <= bounds.x + bounds.width &&
    box.y + box.height <= bounds.y + bounds.height
  );
}

/** Right, left, above, below, the four corners; then the same farther off. */
function candidates(label: LabelToPlace): Box[] {
  const width = labelWidthPx(label.text);
  const height = LABEL_HEIGHT_PX;
  return [NEAR_PX, FAR_PX].flatMap((distance) => {
    const right = label.x + distance;
    const left = label.x - distance - width;
    const above = label.y - distance - height;
    const below = label.y + distance;
    const centreX = label.x - width / 2;
    const centreY = label.y - height / 2;
    const corners: readonly (readonly [number, number])[] = [
      [right, centreY],
      [left, centreY],
      [centreX, above],
      [centreX, below],
      [right, above],
      [left, above],
      [right, below],
      [left, below],
    ];
    return corners.map(([x, y]) => ({ x, y, width, height }));
  });
}

/**
 * Gives each label the first free place round its point, the most important label first.
 *
 * @param input.labels      labels with their points
 * @param input.obstacles   what no label may cover: marks and labels that stand already
 * @param input.bounds      no label leaves them
 * @returns                 the labels that found a place, in the order given; the others are left out
 */
export function placeLabels(input: {
  readonly labels: readonly LabelToPlace[];
  readonly obstacles: readonly Box[];
  readonly bounds: Box;
}): PlacedLabel[] {
  const taken = [...input.obstacles];
  const placed = new Map<string, PlacedLabel>();
  for (const label of [...input.labels].sort((a, b) => b.priority - a.priority)) {
    const box = candidates(label).find(
      (candidate) => isInside(candidate, input.bounds) && !taken.some((other) => overlaps(candidate, other)),
    );
    if (box === undefined) continue;
    taken.push(box);
    placed.set(label.key, { ...label, box });
  }
  return input.labels.flatMap((label) => placed.get(label.key) ?? []);
}
