import fc from 'fast-check';

/** A property that runs out of time fails rather than passing with fewer runs. A failure prints its seed and path. */
fc.configureGlobal({
  numRuns: 200,
  interruptAfterTimeLimit: 4000,
  markInterruptAsFailure: true,
});
