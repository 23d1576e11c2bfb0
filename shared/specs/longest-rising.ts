/**
 * The longest run of numbers that rise in the order given, others left out: what stayed in order when things were moved.
 *
 * Of several as long, the one that ends first. Meant for the lines of one spec: the time goes with the square of the count.
 */
export function longestRising(numbers: readonly number[]): number[] {
  let longest: readonly number[] = [];
  const endingAt: (readonly number[])[] = [];
  for (const number of numbers) {
    let best: readonly number[] = [];
    for (const run of endingAt) {
      const last = run[run.length - 1];
      if (last !== undefined && last < number && run.length > best.length) best = run;
    }
    const run = [...best, number];
    endingAt.push(run);
    if (run.length > longest.length) longest = run;
  }
  return [...longest];
}
