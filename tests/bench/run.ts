import { type BenchModule, printTable } from './harness.ts';
import { figuresBench } from './figures.bench.ts';
import { listBench } from './list.bench.ts';

/** Everything `npm run bench` measures, in order. */
const MODULES: readonly BenchModule[] = [figuresBench, listBench];

let hasFailed = false;
for (const { title, measure } of MODULES) {
  const rows = await measure();
  printTable(title, rows);
  hasFailed ||= rows.some((row) => row.remark.startsWith('FAILED'));
}
if (hasFailed) process.exitCode = 1;
