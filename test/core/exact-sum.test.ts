import { describe, expect, it } from 'vitest';
import { highSlice, lowSlice, secondSlice, sliceConstant } from '../../src/core/exact-sum.ts';
import { randomNumbers } from './random-numbers.ts';

function sum(terms: readonly number[], bound: number): number {
  const constant = sliceConstant(bound);
  let high = 0;
  let low = 0;
  for (const term of terms) {
    const first = highSlice(term, constant);
    high += first;
    low += lowSlice(term, first, constant);
  }
  return high + low;
}

function shuffled<T>(list: readonly T[], next: (below: number) => number): T[] {
  const out = [...list];
  for (let i = out.length - 1; i > 0; i--) {
    const k = next(i + 1);
    [out[i], out[k]] = [out[k], out[i]];
  }
  return out;
}

describe('sums free of order', () => {
  it('have the same bits for any order and grouping, where plain sums have not', () => {
    const next = randomNumbers(17);
    const terms = Array.from({ length: 5000 }, () => (next(2 ** 32) / 2 ** 32) * 10 ** -next(6));
    const expected = sum(terms, 1);
    const plain = new Set<number>();
    for (let round = 0; round < 20; round++) {
      const other = shuffled(terms, next);
      expect(sum(other, 1)).toBe(expected);
      plain.add(other.reduce((a, b) => a + b, 0));
    }
    expect(plain.size).toBeGreaterThan(1);
  });

  it('are exact when no term needs more than 43 bits below the power of two over the bound', () => {
    const next = randomNumbers(23);
    // Whole multiples of 2⁻³⁰ below 2¹²: 42 bits, summed exactly as big integers.
    const counts = Array.from(
      { length: 3000 },
      () => BigInt(next(2 ** 21)) * 2097152n + BigInt(next(2 ** 21)),
    );
    const terms = counts.map((count) => Number(count) * 2 ** -30);
    const whole = counts.reduce((a, b) => a + b, 0n);
    // The whole has 54 bits or fewer, so its nearest float64 is what the sum must be.
    expect(sum(terms, 2 ** 12)).toBe(Number(whole) * 2 ** -30);
  });

  it('are within 2⁻⁴⁴ of that power a term otherwise', () => {
    const next = randomNumbers(29);
    for (const bound of [1, 3, 1e30, 1e-30, 12308463894.123, 5e-324]) {
      // Terms a / 2³² of the bound, from the least to the bound itself, against a sum in big integers of 2⁻³².
      const parts = Array.from({ length: 400 }, () => next(2 ** 32));
      const terms = parts.map((part) => (part / 2 ** 32) * bound);
      const exact = (Number(parts.reduce((a, b) => a + BigInt(b), 0n)) / 2 ** 32) * bound;
      const power = 2 ** Math.ceil(Math.log2(bound));
      expect(Math.abs(sum(terms, bound) - exact)).toBeLessThanOrEqual(
        400 * 2 ** -44 * power + 1e-15 * exact + 400 * 5e-324,
      );
    }
  });

  it('keep each slice a multiple of its unit, so that a billion of them fit', () => {
    const constant = sliceConstant(6);
    const unit = 8 * 2 ** -21;
    const next = randomNumbers(31);
    for (let i = 0; i < 1000; i++) {
      // A third of it, so that all bits are used.
      const term = (next(2 ** 32) / 2 ** 32) * (17 / 3);
      const high = highSlice(term, constant);
      expect(Number.isInteger(high / unit)).toBe(true);
      expect(Math.abs(term - high)).toBeLessThanOrEqual(unit / 2);
      expect(Number.isInteger(lowSlice(term, high, constant) / (unit * secondSlice))).toBe(true);
    }
  });

  it('of a bound of nothing are nothing', () => {
    expect(sliceConstant(0)).toBe(0);
    expect(sum([0, 0], 0)).toBe(0);
  });
});
