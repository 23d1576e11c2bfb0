/**
 * A small bench: warm up, run several times, take the median. It counts the time this process had the processor, so that other
 * programs do not count. Ratios are between rows measured in turn in one process, so they mean the same on a slow
 * machine as on a fast one.
 */

export interface Bench {
  readonly name: string;
  /** Does `count` pieces of work; whatever it returns is kept, so that nothing is optimised away. */
  readonly run: (count: number) => unknown;
}

export interface Measurement {
  readonly name: string;
  readonly perSecond: number;
  readonly microsecondsEach: number;
}

/** A line of the printed table. */
export interface Row {
  readonly name: string;
  readonly value: string;
  readonly remark: string;
}

export interface BenchModule {
  readonly title: string;
  /** Measures, and says what must hold: a row that begins with FAILED makes the whole run fail. */
  readonly measure: () => Promise<Row[]> | Row[];
}

const MICROSECONDS_PER_MS = 1000;
const RUNS = 7;
const WARM_UP_MS = 400;
const RUN_MS = 250;

const kept: unknown[] = [];

function timeMs(bench: Bench, count: number): number {
  const start = process.cpuUsage();
  kept[0] = bench.run(count);
  const { user, system } = process.cpuUsage(start);
  return (user + system) / MICROSECONDS_PER_MS;
}

/** How many pieces of work fill one run, found while warming up. */
function countForRun(bench: Bench): number {
  let count = 64;
  let totalMs = 0;
  let ms = 0;
  while (totalMs < WARM_UP_MS) {
    ms = timeMs(bench, count);
    totalMs += ms;
    if (ms < RUN_MS / 8) count *= 2;
  }
  return Math.max(1, Math.round((count * RUN_MS) / ms));
}

function median(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)]!;
}

/** Median speed of several benches in processor time, their runs taken in turn so that a bad moment hits all alike. */
export function measureInTurn(benches: readonly Bench[]): Measurement[] {
  const counts = benches.map(countForRun);
  const times = benches.map((): number[] => []);
  for (let run = 0; run < RUNS; run += 1) {
    benches.forEach((bench, index) => times[index]!.push(timeMs(bench, counts[index]!) / counts[index]!));
  }
  return benches.map((bench, index) => {
    const msEach = median(times[index]!);
    return { name: bench.name, perSecond: 1000 / msEach, microsecondsEach: 1000 * msEach };
  });
}

export function printTable(title: string, rows: readonly Row[]): void {
  const width = (pick: (row: Row) => string) => Math.max(...rows.map((row) => pick(row).length));
  const [names, values] = [width((row) => row.name), width((row) => row.value)];
  console.log(`\n${title}`);
  for (const row of rows) {
    console.log(`  ${row.name.padEnd(names)}  ${row.value.padStart(values)}  ${row.remark}`);
  }
}
