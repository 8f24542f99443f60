import fc from 'fast-check';
import { vi } from 'vitest';

/** The seed of this run: `OVERBRIM_SEED` repeats an earlier one. */
export const seed = Number(process.env.OVERBRIM_SEED ?? Date.now() % 2147483647);
console.log(`Random grids with seed ${seed}; OVERBRIM_SEED=${seed} repeats them.`);

// Thousands of grids take seconds, on a busy machine many.
vi.setConfig({ testTimeout: 120_000 });

/** Tests a property on `runs` random cases; a failure is reported with its seed and smallest counterexample. */
export function check<T>(runs: number, cases: fc.Arbitrary<T>, property: (value: T) => void): void {
  fc.assert(fc.property(cases, property), { numRuns: runs, seed });
}
