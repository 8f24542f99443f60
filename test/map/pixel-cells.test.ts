import type Projection from 'ol/proj/Projection.js';
import { get } from 'ol/proj.js';
import { describe, expect, it } from 'vitest';
import { canvasFrame } from '../../src/map/canvas-frame.ts';
import { PixelCells } from '../../src/map/pixel-cells.ts';
import { fromMercator, madeView, utm33, wgs84 } from './made-view.ts';

function projection(code: string): Projection {
  const found = get(code);
  if (!found) throw new Error(`no ${code}`);
  return found;
}

/** A frame of a view with its middle, units per CSS pixel and rotation, as the map library would hand it over. */
function frameOf(width: number, height: number, middle: [number, number], resolution: number, turn: number) {
  const [cos, sin] = [Math.cos(turn) * resolution, Math.sin(turn) * resolution];
  const affine = [
    cos,
    sin,
    sin,
    -cos,
    middle[0] - (width / 2) * cos - (height / 2) * sin,
    middle[1] - (width / 2) * sin + (height / 2) * cos,
  ];
  return canvasFrame({ left: 0, top: 0, width, height }, 1, affine, 1);
}

describe('PixelCells', () => {
  // Source: the projection library asked for each pixel by itself, without a lattice.
  it.each([0, 0.7])('finds the cell that exact projection of each pixel finds, turned by %d', (turn) => {
    const survey = madeView({ width: 240, height: 180 });
    const exact = fromMercator(utm33);
    const frame = frameOf(640, 480, [1_565_600, 6_080_250], 3.1, turn);
    const { index, halvings } = new PixelCells(survey).at(frame, projection('EPSG:3857'));
    expect(halvings).toBe(0);
    const [a, b, c, d, e, f] = frame.toView;
    let inside = 0;
    for (let j = 0; j < frame.height; j++) {
      for (let i = 0; i < frame.width; i++) {
        const [x, y] = exact(a * i + c * j + e, b * i + d * j + f);
        const column = (x - 430_000) / 5;
        const row = (5_300_000 - y) / 5;
        const off = Math.min(Math.abs(column - Math.round(column)), Math.abs(row - Math.round(row)));
        if (off < 0.002) continue;
        const isInside = column >= 0 && column < 240 && row >= 0 && row < 180;
        if (isInside) inside++;
        const expected = isInside ? Math.floor(row) * 240 + Math.floor(column) : -1;
        if (index[j * frame.width + i] !== expected) {
          expect({ i, j, found: index[j * frame.width + i] }).toEqual({ i, j, found: expected });
        }
      }
    }
    expect(inside).toBeGreaterThan(40_000);
    expect(inside).toBeLessThan(640 * 480);
  });

  it('halves the grid until at most two cells fall on a pixel', () => {
    const survey = madeView({ width: 1001, height: 777 });
    const cells = new PixelCells(survey);
    const own = (resolution: number) =>
      cells.at(frameOf(300, 200, [432_500, 5_298_000], resolution, 0), terrainView());
    expect(own(10).halvings).toBe(0);
    expect(own(10.1).halvings).toBe(1);
    expect(own(41).halvings).toBe(3);
    const { index, halvings } = own(41);
    // ⌈1001 / 8⌉ × ⌈777 / 8⌉ blocks.
    expect(Math.max(...index)).toBeLessThan(126 * 98);
    expect(Math.max(...index)).toBeGreaterThan(126 * 90);
    expect(halvings).toBe(3);
  });

  it('shows a globe in each copy of the world and over its seam', () => {
    const survey = madeView({
      width: 36,
      height: 18,
      wraps: true,
      georeference: {
        ...madeView({ width: 1, height: 1 }).georeference,
        crs: wgs84,
        west: 0,
        north: 90,
        cellWidth: 10,
        cellHeight: 10,
      },
    });
    // Two copies of the world at 1 degree a pixel, from 180° W to 540° E.
    const frame = frameOf(720, 100, [180, 0], 1, 0);
    const { index } = new PixelCells(survey).at(frame, projection('EPSG:4326'));
    for (let i = 0; i < 720; i++) {
      const longitude = (i + 0.5 - 180 + 360) % 360;
      expect(index[10 * 720 + i]).toBe(Math.floor((90 - 39.5) / 10) * 36 + Math.floor(longitude / 10));
    }
  });

  it('hands the same cells to every layer of a view, and new ones to the next', () => {
    const cells = new PixelCells(madeView({ width: 30, height: 30 }));
    const first = cells.at(frameOf(64, 64, [430_075, 5_299_925], 1, 0), terrainView());
    expect(cells.at(frameOf(64, 64, [430_075, 5_299_925], 1, 0), terrainView())).toBe(first);
    expect(cells.at(frameOf(64, 64, [430_076, 5_299_925], 1, 0), terrainView()).key).not.toBe(first.key);
  });
});

function terrainView(): Projection {
  // Any projection of the terrain's own code stands for its CRS.
  return { getCode: () => 'EPSG:32633' } as unknown as Projection;
}
