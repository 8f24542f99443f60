import { describe, expect, it } from 'vitest';
import { pondsOf } from './found-ponds.ts';

/** One pond, at some columns of a row, in ground at 9 m; beside it a channel that drains at its lowest cell. */
function globe(columns: number, wet: readonly number[]): number[][] {
  const row = Array.from({ length: columns }, (_, column) => (wet.includes(column) ? 1 : 9));
  const high = new Array<number>(columns).fill(9);
  const channel = Array.from({ length: columns }, (_, column) => (column === 1 ? 0 : 5));
  return [high, row, high, channel, high];
}

const place = (west: number, cellSize: number) => ({ epsg: 4326, west, north: 25, cellSize });
const inputs = { outlets: ['deepest'], verticalUnit: 'm' };

/** Longitudes of each ring of each polygon. */
async function longitudes(rows: number[][], west: number, cellSize: number): Promise<number[][][]> {
  const { ponds } = await pondsOf(rows, {
    place: place(west, cellSize),
    inputs: { ...inputs, edges: 'open' },
  });
  return ponds.features.map(({ geometry }) =>
    (geometry as { coordinates: number[][][][] }).coordinates.map((rings) =>
      [...new Set(rings[0].map(([longitude]) => longitude))].sort((a, b) => a - b),
    ),
  );
}

describe('outlines near the antimeridian', () => {
  it('are not cut at Greenwich on a grid from 0° to 360°, and stay within ±180°', async () => {
    const [pond] = await longitudes(globe(36, [0, 1, 35]), 0, 10);
    expect(pond).toEqual([[-10, 20]]);
  });

  it('are cut at 180° in the middle of such a grid', async () => {
    const [pond] = await longitudes(globe(36, [17, 18]), 0, 10);
    expect(pond.sort((a, b) => a[0] - b[0])).toEqual([
      [-180, -170],
      [170, 180],
    ]);
  });

  it('are cut through the middle of a cell where 180° lies there', async () => {
    const [pond] = await longitudes(globe(36, [17, 18, 19]), -5, 10);
    expect(pond.sort((a, b) => a[0] - b[0])).toEqual([
      [-180, -165],
      [165, 180],
    ]);
  });

  it('are cut at the first column of a grid that starts half a cell beyond -180°', async () => {
    const [pond] = await longitudes(globe(36, [35, 0, 1]), -185, 10);
    expect(pond.sort((a, b) => a[0] - b[0])).toEqual([
      [-180, -165],
      [165, 180],
    ]);
  });

  it('are cut on a part of the globe that reaches over it, on an edge and inside a cell', async () => {
    const onEdge = await longitudes(globe(6, [2, 3]), 150, 10);
    expect(onEdge[0].sort((a, b) => a[0] - b[0])).toEqual([
      [-180, -170],
      [170, 180],
    ]);
    const inside = await longitudes(globe(6, [2, 3]), 155, 10);
    expect(inside[0].sort((a, b) => a[0] - b[0])).toEqual([
      [-180, -165],
      [175, 180],
    ]);
  });
});
