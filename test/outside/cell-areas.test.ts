import geographiclib from 'geographiclib-geodesic';
import { describe, expect, it } from 'vitest';
import { geographicMetrics } from '../../src/core/metrics.ts';

/** Half of the last digit printed. */
const digits = (value: number, printed: number, half: number): void => {
  expect(Math.abs(value - printed)).toBeLessThanOrEqual(half);
};

/**
 * Source: authalic latitude on WGS 84 (Snyder, Map Projections: A Working Manual, 1987, eq. 3-12), values computed
 * in double precision from the formula, km².
 */
const degreeCells: readonly [southDeg: number, areaKm2: number][] = [
  [0, 12308.463894],
  [30, 10642.393439],
  [45, 8686.494957],
  [60, 6123.140879],
  [89, 108.866682],
];

describe('cells of one degree', () => {
  it.each(degreeCells)('from %i° north have their published area', (southDeg, areaKm2) => {
    digits(geographicMetrics(1, southDeg + 1, 1, 1).areaM2[0] / 1e6, areaKm2, 0.5e-6);
    digits(geographicMetrics(1, -southDeg, 1, 1).areaM2[0] / 1e6, areaKm2, 0.5e-6);
  });

  it.each(degreeCells)('from %i° north have the area of a geodesic polygon along their sides', (southDeg) => {
    // Source: Karney, Algorithms for geodesics, 2013, by the library geographiclib-geodesic. Parallels are no
    // geodesics, so they are cut into a thousand steps; what is left is of the order of 1e-8.
    const polygon = geographiclib.Geodesic.WGS84.Polygon(false);
    const steps = 1000;
    for (let i = 0; i <= steps; i++) polygon.AddPoint(southDeg, i / steps);
    for (let i = steps; i >= 0; i--) polygon.AddPoint(southDeg + 1, i / steps);
    const area = polygon.Compute(false, true).area ?? Number.NaN;
    expect(geographicMetrics(1, southDeg + 1, 1, 1).areaM2[0] / area).toBeCloseTo(1, 7);
  });
});

describe('the whole ellipsoid', () => {
  it.each([1, 3, 20, 90])('has its published area in cells of %i degrees', (cellDeg) => {
    const { areaM2 } = geographicMetrics(180 / cellDeg, 90, cellDeg, cellDeg);
    const whole = areaM2.reduce((sum, area) => sum + area * (360 / cellDeg), 0);
    // Source as above: 510,065,621.724 km².
    digits(whole / 1e6, 510065621.724, 0.5e-3);
  });

  it('has that area too where rows are registered on the poles', () => {
    const { areaM2 } = geographicMetrics(181, 90.5, 1, 1);
    digits(areaM2.reduce((sum, area) => sum + area * 360, 0) / 1e6, 510065621.724, 0.5e-3);
  });

  it("agrees with the geodesic library's own figure", () => {
    // Source: geographiclib-geodesic; a polygon around the equator holds half the ellipsoid.
    const polygon = geographiclib.Geodesic.WGS84.Polygon(false);
    for (const lon of [0, 90, 180, -90]) polygon.AddPoint(0, lon);
    const half = Math.abs(polygon.Compute(false, true).area ?? Number.NaN);
    const { areaM2 } = geographicMetrics(1, 90, 360, 90);
    expect(areaM2[0] / half).toBeCloseTo(1, 12);
  });
});

describe('lengths of a degree', () => {
  it('are the published ones', () => {
    // Source: radii of curvature on WGS 84 (Snyder 1987, eq. 4-18 to 4-21), values computed from the formula, m.
    digits(geographicMetrics(1, 0.5, 1, 1).southM[0], 110574.2758, 0.5e-4);
    digits(geographicMetrics(1, 45.5, 1, 1).southM[0], 111131.7774, 0.5e-4);
    digits(geographicMetrics(1, 45.5, 1, 1).eastM[0], 78846.8351, 0.5e-4);
  });

  it.each([0, 17, 45, 71, 89])('at %i° agree with geodesics over a hundredth of a degree', (latDeg) => {
    // Source: geographiclib-geodesic, inverse problem; arcs that short differ from geodesics by less than 1e-8.
    const { Geodesic } = geographiclib;
    const length = (lat1: number, lat2: number, lon: number): number =>
      Geodesic.WGS84.Inverse(lat1, 0, lat2, lon).s12 ?? Number.NaN;
    const { southM, eastM } = geographicMetrics(1, latDeg + 0.005, 0.01, 0.01);
    expect(southM[0] / length(latDeg + 0.005, latDeg - 0.005, 0)).toBeCloseTo(1, 7);
    expect(eastM[0] / length(latDeg, latDeg, 0.01)).toBeCloseTo(1, 7);
  });
});
