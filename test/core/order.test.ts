import { describe, expect, it } from 'vitest';
import { keyHalves, orderedKeys, stableOrder } from '../../src/core/order.ts';
import { randomNumbers } from './random-numbers.ts';

describe('ordered keys', () => {
  it('keep the order of float32 values from −huge over 0 to +huge', () => {
    const values = Float32Array.of(
      -3.4e38,
      -1e30,
      -2,
      -1.5,
      -1,
      -1e-30,
      -1.4e-45,
      0,
      1.4e-45,
      1e-30,
      0.1,
      1,
      2,
      3.4e38,
    );
    const keys = orderedKeys(values);
    for (let i = 1; i < keys.length; i++) expect(keys[i]).toBeGreaterThan(keys[i - 1]);
  });

  it('agree with comparing the values on random bits, also in a part of a larger buffer', () => {
    const next = randomNumbers(11);
    const words = new Uint32Array(2000).map(() => next(2 ** 32));
    const values = new Float32Array(words.buffer).subarray(7).filter((v) => Number.isFinite(v) && v !== 0);
    const keys = orderedKeys(values);
    for (let i = 1; i < values.length; i++) {
      expect(Math.sign(keys[i] - keys[i - 1])).toBe(Math.sign(values[i] - values[i - 1]));
    }
  });
});

describe('halves of cell indices', () => {
  it('put the outside first and hold indices beyond 32 bits', () => {
    const cells = Float64Array.of(2 ** 33 + 5, -1, 0, 4294967295, 4294967294, 3);
    const order = [...stableOrder(cells.length, keyHalves(cells))];
    expect(order.map((at) => cells[at])).toEqual([-1, 0, 3, 4294967294, 4294967295, 2 ** 33 + 5]);
  });
});

describe('stable order', () => {
  it('is that of a comparison sort by the last key first, equal ones in their old order', () => {
    const next = randomNumbers(3);
    for (const [count, most] of [
      [0, 1],
      [1, 1],
      [300, 4],
      [500, 2 ** 32],
      [1000, 5000],
      [64, 1],
    ]) {
      const low = new Uint32Array(count).map(() => next(most));
      const high = new Uint32Array(count).map(() => next(3));
      const expected = Array.from({ length: count }, (_, i) => i).sort(
        (a, b) => high[a] - high[b] || low[a] - low[b] || a - b,
      );
      expect([...stableOrder(count, [low, high])]).toEqual(expected);
    }
  });
});
