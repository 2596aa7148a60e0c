// One seed for every property test, so that a run today is the run of tomorrow.
import fc from 'fast-check';

fc.configureGlobal({ seed: 20_240_229, numRuns: 60 });
