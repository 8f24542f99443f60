import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { gridOf, plainFrame } from '../../src/core/grid.ts';
import { projectedMetrics } from '../../src/core/metrics.ts';

const metrics = (height: number) => projectedMetrics(height, 1, 1);
const refused = (message: string): OverbrimError => new OverbrimError('bad-input', message);

describe('a grid', () => {
  it('has −0 made 0 and keeps voids', () => {
    const z = Float32Array.of(-0, 1, Number.NaN, -0);
    const grid = gridOf(2, 2, z, metrics(2));
    expect([...grid.elevationM]).toEqual([0, 1, Number.NaN, 0]);
    expect(grid.elevationM).toBe(z);
    expect(grid.frame).toBe(plainFrame);
  });
});

describe('is refused in a sentence', () => {
  it.each([
    [0, 3],
    [3, 0],
    [2.5, 2],
    [-1, 4],
    [Number.NaN, 1],
  ])('with sides of %s × %s', (width, height) => {
    expect(() => gridOf(width, height, new Float32Array(6), metrics(3))).toThrow(
      refused(
        `A grid of ${width} × ${height} cells was given; both sides must be whole numbers of at least 1.`,
      ),
    );
  });

  it('with too few or too many elevations', () => {
    expect(() => gridOf(3, 2, new Float32Array(5), metrics(2))).toThrow(
      refused('5 elevations were given for 3 × 2 cells; expected 6, row by row.'),
    );
  });

  it('with metrics of another grid', () => {
    expect(() => gridOf(3, 2, new Float32Array(6), metrics(3))).toThrow(
      refused('Metrics of 3 rows were given for a grid of 2 rows; make them for the same grid.'),
    );
  });

  it('that wraps in fewer than three columns', () => {
    const frame = { wraps: true, north: 'beyond', south: 'beyond' } as const;
    expect(() => gridOf(2, 1, new Float32Array(2), metrics(1), frame)).toThrow(
      refused(
        'A grid of 2 columns is said to wrap around; expected at least 3 columns, so give it as a plain frame.',
      ),
    );
    expect(gridOf(3, 1, new Float32Array(3), metrics(1), frame).frame.wraps).toBe(true);
  });

  it.each([Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])('with an elevation of %s', (value) => {
    expect(() => gridOf(3, 2, Float32Array.of(0, 1, 2, 3, 4, value), metrics(2))).toThrow(
      refused(
        `The elevation at column 2, row 1 is ${value}; expected a finite number of metres or a void, so declare the value as no-data or mend the file.`,
      ),
    );
  });

  it('with nothing but voids', () => {
    expect(() => gridOf(2, 2, new Float32Array(4).fill(Number.NaN), metrics(2))).toThrow(
      refused(
        'All 4 cells are void; expected at least one elevation, so check the extent and the no-data value.',
      ),
    );
  });
});
