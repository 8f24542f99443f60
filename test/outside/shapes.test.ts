import { describe, expect, it } from 'vitest';
import {
  depressionsOf,
  drainageOf,
  gridOf,
  outermostOf,
  outletSills,
  pondMeasures,
  projectedMetrics,
  surveyOf,
  usualOutlets,
} from '../../src/core/index.ts';

/** A hollow in level ground: elevation above its lowest point, metres, at a distance in metres from its middle. */
interface Shape {
  readonly name: string;
  readonly capacityM3: number;
  readonly areaM2: number;
  /** Half the sides of the hollow at the brim. */
  readonly halfWidthM: number;
  readonly halfHeightM: number;
  readonly depthM: number;
  readonly perimeterM: number;
  readonly steepest: number;
  readonly elevationM: (x: number, y: number) => number;
}

const round = (
  name: string,
  depthM: number,
  radiusM: number,
  given: Pick<Shape, 'capacityM3' | 'areaM2' | 'steepest'>,
  at: (r: number) => number,
): Shape => ({
  name,
  depthM,
  halfWidthM: radiusM,
  halfHeightM: radiusM,
  perimeterM: 2 * Math.PI * radiusM,
  ...given,
  elevationM: (x, y) => at(Math.hypot(x, y)),
});

// Spherical cap: radius of the sphere 50, depth 8, so the water surface has the radius √(2·50·8 − 8²).
const capRadius = Math.sqrt(2 * 50 * 8 - 64);

/**
 * Source of the capacities: geometry (π R² H / 3; half the cylinder; π h² (3 r − h) / 3; a frustum with prismoidal
 * faces, average of end areas by the prismoidal rule as in FHWA HEC-22 ch. 8, value from memory).
 */
const shapes: readonly Shape[] = [
  round(
    'cone R 30 H 6',
    6,
    30,
    { capacityM3: 5654.866776, areaM2: Math.PI * 900, steepest: 6 / 30 },
    (r) => (6 * r) / 30,
  ),
  round(
    'paraboloid R 30 H 6',
    6,
    30,
    { capacityM3: 8482.300165, areaM2: Math.PI * 900, steepest: 12 / 30 },
    (r) => 6 * (r / 30) ** 2,
  ),
  round(
    'spherical cap r 50 h 8',
    8,
    capRadius,
    { capacityM3: 9516.931345, areaM2: 2312.212193, steepest: capRadius / 42 },
    (r) => (r >= capRadius ? 8 : 50 - Math.sqrt(2500 - r * r)),
  ),
  {
    name: 'trapezoidal basin L 100 W 50 side slope 3 depth 4',
    capacityM3: 27968,
    areaM2: 124 * 74,
    halfWidthM: 62,
    halfHeightM: 37,
    depthM: 4,
    perimeterM: 2 * (124 + 74),
    steepest: 1 / 3,
    elevationM: (x, y) => Math.max(0, Math.abs(x) - 50, Math.abs(y) - 25) / 3,
  },
];

/** The one outermost pond of a shape sunk into level ground, its middle off the grid's lines. */
function pondOf(shape: Shape, cellM: number): { capacityM3: number; areaM2: number; depthM: number } {
  const width = Math.ceil((2 * shape.halfWidthM) / cellM) + 6;
  const height = Math.ceil((2 * shape.halfHeightM) / cellM) + 6;
  const z = new Float32Array(width * height);
  for (let row = 0; row < height; row++) {
    for (let column = 0; column < width; column++) {
      const x = (column - width / 2 + 0.5 - 0.137) * cellM;
      const y = (height / 2 - row - 0.5 + 0.281) * cellM;
      z[row * width + column] = Math.min(shape.depthM, shape.elevationM(x, y));
    }
  }
  const grid = gridOf(width, height, z, projectedMetrics(height, cellM, cellM));
  const survey = surveyOf(grid);
  const drainage = drainageOf(survey, outletSills(grid, survey, usualOutlets));
  const depressions = depressionsOf(survey, drainage);
  const { capacityM3, areaM2 } = pondMeasures(grid, survey, drainage, depressions);
  const outermost = new Set(outermostOf(depressions.parent).filter((node) => depressions.isPond[node] === 1));
  expect(outermost.size).toBe(1);
  const [node] = outermost;
  const depthM = depressions.spillElevationM[node] - depressions.pitElevationM[node];
  return { capacityM3: capacityM3[node], areaM2: areaM2[node], depthM };
}

describe.each(shapes)('capacity of a $name', (shape) => {
  const cellSizes = [4, 2, 1, 0.5];
  const ponds = cellSizes.map((cellM) => ({ cellM, ...pondOf(shape, cellM) }));

  it('is the exact one within C × perimeter × cell × depth', () => {
    // A cell's centre stands for ground at most half a diagonal away, so no depth is wrong by more than
    // steepest × cell × √2 / 2, over the area of the water and a rim of half a diagonal.
    for (const { cellM, capacityM3 } of ponds) {
      const halfDiagonal = cellM * Math.SQRT1_2;
      const wetM2 = shape.areaM2 + shape.perimeterM * halfDiagonal + Math.PI * halfDiagonal ** 2;
      const c = (shape.steepest * wetM2 * Math.SQRT1_2) / (shape.perimeterM * shape.depthM);
      const toleranceM3 = c * shape.perimeterM * cellM * shape.depthM;
      expect(Math.abs(capacityM3 - shape.capacityM3), `cells of ${cellM} m`).toBeLessThanOrEqual(toleranceM3);
    }
  });

  it('comes closer with smaller cells, to a thousandth at half a metre', () => {
    const errors = ponds.map(({ capacityM3 }) => Math.abs(capacityM3 / shape.capacityM3 - 1));
    expect(errors[3]).toBeLessThan(errors[0] / 4);
    expect(Math.max(errors[2], errors[3])).toBeLessThan(Math.max(errors[0], errors[1]));
    expect(errors[3]).toBeLessThan(0.001);
  });

  it('comes with area and depth that tend to the exact ones', () => {
    for (const { cellM, areaM2, depthM } of ponds) {
      expect(Math.abs(areaM2 - shape.areaM2)).toBeLessThanOrEqual(
        shape.perimeterM * cellM * Math.SQRT1_2 + Math.PI * cellM ** 2,
      );
      expect(Math.abs(depthM - shape.depthM)).toBeLessThanOrEqual(
        shape.steepest * cellM * Math.SQRT1_2 + 1e-5,
      );
    }
  });
});

describe('pits inside pits with upright walls', () => {
  /** Rectangles sunk one into another: x, y, width, height in metres, and the elevation of their floors. */
  const floors: readonly (readonly [number, number, number, number, number])[] = [
    [0, 0, 48, 40, 20],
    [4, 4, 40, 32, 14],
    [8, 8, 12, 20, 9.5],
    [24, 8, 16, 24, 11.25],
    [28, 12, 4, 8, 3.125],
    // A way out of the outer pit, whose floor is its pour point.
    [44, 16, 4, 4, 18],
  ];

  /**
   * Source: geometry of prisms. Each pit holds its floor area times the depth below its pour point, and what lies
   * deeper inside it. The outer one spills at 18, the inner ones where they reach its floor at 14.
   */
  const left = 12 * 20 * (14 - 9.5);
  const right = 16 * 24 * (14 - 11.25) + 4 * 8 * (11.25 - 3.125);
  const deepest = 4 * 8 * (11.25 - 3.125);
  const outer = 40 * 32 * (18 - 14) + left + right;

  it.each([4, 2, 1, 0.5])('hold exactly the volume of their prisms, in cells of %s m', (cellM) => {
    const width = 48 / cellM;
    const height = 40 / cellM;
    const z = new Float32Array(width * height);
    for (const [x, y, w, h, floor] of floors) {
      for (let row = y / cellM; row < (y + h) / cellM; row++) {
        z.fill(floor, row * width + x / cellM, row * width + (x + w) / cellM);
      }
    }
    const grid = gridOf(width, height, z, projectedMetrics(height, cellM, cellM));
    const survey = surveyOf(grid);
    const drainage = drainageOf(survey, outletSills(grid, survey, usualOutlets));
    const depressions = depressionsOf(survey, drainage);
    const { capacityM3 } = pondMeasures(grid, survey, drainage, depressions);
    const found = [...depressions.isPond.keys()]
      .filter((node) => depressions.isPond[node] === 1)
      .map((node) => [depressions.spillElevationM[node], depressions.pitElevationM[node], capacityM3[node]])
      .sort((a, b) => a[0] - b[0] || a[1] - b[1]);
    expect(deepest).toBe(260);
    expect(found).toEqual([
      [14, 3.125, right],
      [14, 9.5, left],
      [18, 3.125, outer],
    ]);
  });
});
