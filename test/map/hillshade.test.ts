import geodesic from 'geographiclib-geodesic';
import { describe, expect, it } from 'vitest';
import { cellSizes } from '../../src/map/cell-sizes.ts';
import { hillshade } from '../../src/map/hillshade.ts';
import { madeView, wgs84 } from './made-view.ts';

/** Lambert's cosine law with the normal from the cross product of two edges of the plane: the formula's definition. */
function lambert(slopeEast: number, slopeNorth: number, azimuthDeg: number, altitudeDeg: number): number {
  const normal = [-slopeEast, -slopeNorth, 1];
  const [azimuth, altitude] = [azimuthDeg, altitudeDeg].map((angle) => (angle * Math.PI) / 180);
  const light = [
    Math.sin(azimuth) * Math.cos(altitude),
    Math.cos(azimuth) * Math.cos(altitude),
    Math.sin(altitude),
  ];
  const dot = normal.reduce((sum, part, axis) => sum + part * light[axis], 0);
  return Math.max(0, dot / Math.hypot(...normal));
}

describe('hillshade', () => {
  it.each([
    [0, 0, 315, 45],
    [0.5, -0.25, 315, 45],
    [-1, 1, 315, 45],
    [1.5, -1.5, 315, 45],
    [0.1, 0.3, 200, 30],
  ])(
    'of a plane of slope %d east, %d north is the cosine to light from %d° at %d°',
    (east, north, azimuthDeg, altitudeDeg) => {
      const [width, height] = [7, 6];
      const elevationM = Float32Array.from(
        { length: width * height },
        (_, cell) => 5 * (east * (cell % width) - north * Math.floor(cell / width)),
      );
      const { value } = hillshade(madeView({ width, height, elevationM }), {
        azimuthDeg,
        altitudeDeg,
        exaggeration: 1,
      });
      const expected = 1 + Math.round(254 * lambert(east, north, azimuthDeg, altitudeDeg));
      for (let row = 1; row < height - 1; row++) {
        for (let column = 1; column < width - 1; column++) {
          expect(Math.abs(value[row * width + column] - expected)).toBeLessThanOrEqual(1);
        }
      }
    },
  );

  // Horn (1981) weighs the middle row twice: a ridge one cell wide beside the cell gives p = 4z / 8d, not z / 2d alone.
  it('weighs neighbours across sides twice those across corners', () => {
    const elevationM = Float32Array.of(0, 0, 0, 0, 0, 4, 0, 0, 0);
    const corner = Float32Array.of(0, 0, 4, 0, 0, 0, 0, 0, 0);
    const light = { azimuthDeg: 90, altitudeDeg: 45, exaggeration: 1 };
    const side = hillshade(madeView({ width: 3, height: 3, elevationM }), light).value[4];
    expect(side).toBe(1 + Math.round(254 * lambert(8 / 40, 0, 90, 45)));
    const edge = hillshade(madeView({ width: 3, height: 3, elevationM: corner }), light).value[4];
    expect(edge).toBe(1 + Math.round(254 * lambert(4 / 40, 4 / 40, 90, 45)));
  });

  it('leaves voids out and takes no height from them', () => {
    const elevationM = new Float32Array(9).fill(3);
    elevationM[5] = Number.NaN;
    const { value } = hillshade(madeView({ width: 3, height: 3, elevationM }));
    expect(value[5]).toBe(0);
    expect(new Set(value.filter((shade) => shade > 0))).toEqual(
      new Set([1 + Math.round(254 * Math.SQRT1_2)]),
    );
  });
});

describe('cellSizes', () => {
  // Source: geodesics on WGS 84 by GeographicLib (Karney 2013).
  it('of a geographic grid are arcs of the ellipsoid', () => {
    const georeference = {
      ...madeView({ width: 1, height: 1 }).georeference,
      crs: wgs84,
      north: 60,
      cellWidth: 1e-3,
      cellHeight: 1e-3,
    };
    const { eastM, southM } = cellSizes({ height: 3, georeference });
    const wgs = geodesic.Geodesic.WGS84;
    for (let row = 0; row < 3; row++) {
      const latitude = 60 - (row + 0.5) * 1e-3;
      expect(eastM[row]).toBeCloseTo(Number(wgs.Inverse(latitude, 0, latitude, 1e-3).s12), 4);
      expect(southM[row]).toBeCloseTo(Number(wgs.Inverse(latitude + 5e-4, 0, latitude - 5e-4, 0).s12), 4);
    }
  });

  it('of a projected grid are those of its unit', () => {
    const { georeference } = madeView({ width: 1, height: 1 });
    const feet = { ...georeference, crs: { ...georeference.crs, unitM: 0.3048 } };
    expect(cellSizes({ height: 1, georeference: feet }).eastM[0]).toBeCloseTo(1.524, 12);
  });
});
