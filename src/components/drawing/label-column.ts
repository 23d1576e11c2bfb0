/** Labels under each other beside a drawing: each as near to its place as the others let it. */

/**
 * Moves places apart until none is nearer to the next than the gap; they keep their order.
 *
 * Labels that touch form a block, which stands where its members would be on average, within the bounds.
 * @param input.places   wanted places, in any order [px]
 * @param input.gap      least distance between two [px]
 * @param input.min      no label above [px]
 * @param input.max      none below [px]; given up before the gap is
 */
export function spreadLabels(input: {
  readonly places: readonly number[];
  readonly gap: number;
  readonly min: number;
  readonly max: number;
}): number[] {
  const { places, gap, min, max } = input;
  const order = places.map((_, index) => index).sort((a, b) => places[a]! - places[b]!);
  const blocks: { members: number[]; start: number }[] = [];
  const startOf = (members: readonly number[]): number => {
    const wanted = members.reduce((sum, member, at) => sum + places[member]! - at * gap, 0) / members.length;
    return Math.max(min, Math.min(wanted, max - (members.length - 1) * gap));
  };
  for (const member of order) {
    let block = { members: [member], start: startOf([member]) };
    for (let above = blocks.at(-1); above !== undefined; above = blocks.at(-1)) {
      if (above.start + above.members.length * gap <= block.start) break;
      blocks.pop();
      const members = [...above.members, ...block.members];
      block = { members, start: startOf(members) };
    }
    blocks.push(block);
  }
  const spread = places.map(() => 0);
  for (const { members, start } of blocks) {
    members.forEach((member, at) => (spread[member] = start + at * gap));
  }
  return spread;
}
