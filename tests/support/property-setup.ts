import fc from 'fast-check';
import { vi } from 'vitest';

/** Generous on a busy machine: a property takes a second or two. */
const TIME_LIMIT_MS = 20_000;
const MARGIN_MS = 10_000;

/** A property that runs out of time fails rather than passing with fewer runs. A failure prints its seed and path. */
fc.configureGlobal({
  numRuns: 200,
  interruptAfterTimeLimit: TIME_LIMIT_MS,
  markInterruptAsFailure: true,
});
vi.setConfig({ testTimeout: TIME_LIMIT_MS + MARGIN_MS });
