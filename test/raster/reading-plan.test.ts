import { describe, expect, test } from 'vitest';
import { memorySource } from '../../src/raster/byte-source.ts';
import { openTerrain } from '../../src/raster/open-terrain.ts';
import { opened, plane, ramp, refusal } from './open.ts';
import { type TiffSpec, tiffBytes } from './tiff-builder.ts';

const overview = (factor: number): TiffSpec => ({
  width: Math.ceil(40 / factor),
  height: Math.ceil(24 / factor),
  values: plane(Math.ceil(40 / factor), Math.ceil(24 / factor), () => factor),
  tile: [16, 16],
});
const full: TiffSpec = {
  width: 40,
  height: 24,
  values: ramp(40, 24),
  tile: [16, 16],
  place: [1000, 2000, 10, 10],
  overviews: [overview(4), overview(2)],
};

describe('windows', () => {
  const expected = plane(5, 3, (c, r) => (r + 7) * 40 + c + 14);

  test.each<[string, Partial<TiffSpec>]>([
    ['tiles', {}],
    ['strips', { tile: undefined as never, rowsPerStrip: 5 }],
    ['packed', { deflate: true }],
  ])('by cells, across blocks, of %s', async (_, layout) => {
    const spec = { ...full, ...layout };
    const terrain = await opened([spec], { window: { column: 14, row: 7, width: 5, height: 3 } });
    expect(Array.from(terrain.grid.elevationM)).toEqual(expected);
    expect(terrain.georeference).toMatchObject({ west: 1140, north: 1930, cellWidth: 10 });
    expect(terrain.notices).toEqual([
      {
        kind: 'window',
        message:
          'A window of 5 × 3 cells was read, from column 14, row 7 of 40 × 24; water from beyond it is not seen.',
      },
    ]);
    expect(terrain.files[0].hashOf).toBe('ranges');
  });

  test('by coordinates: every cell that is touched', async () => {
    const exact = await opened([full], { bbox: [1140, 1900, 1190, 1930] });
    const touched = await opened([full], { bbox: [1141, 1901, 1189, 1929] });
    expect(Array.from(exact.grid.elevationM)).toEqual(expected);
    expect(touched.sha256).toBe(exact.sha256);
  });

  test('are cut at the terrain, and refused outside it', async () => {
    const { grid } = await opened([full], { window: { column: 38, row: -5, width: 10, height: 6 } });
    expect([grid.width, grid.height, grid.elevationM[0]]).toEqual([2, 1, 38]);
    expect(await refusal(opened([full], { bbox: [0, 0, 10, 10] }))).toBe(
      'bad-input: The extent (--extent) lies outside the terrain; expected one within 40 × 24 cells, that is west 1000, south 1760, east 1400, north 2000.',
    );
  });

  test('read only the blocks that they touch', async () => {
    const bytes = tiffBytes({ ...full, width: 400, height: 240, values: ramp(400, 240), overviews: [] });
    let read = 0;
    const counting = {
      name: 'big.tif',
      size: bytes.length,
      read: async (offset: number, length: number) => {
        read += Math.min(length, bytes.length - offset);
        return bytes.slice(offset, offset + length);
      },
    };
    await openTerrain([counting], { window: { column: 20, row: 20, width: 4, height: 4 } });
    // Header, directory and one tile, each by way of a 64 kB chunk: far from the 390 kB of the file.
    expect(bytes.length).toBeGreaterThan(380_000);
    expect(read).toBeLessThanOrEqual(3 * 65536);
  });

  test('the same ranges have the same hash, others another', async () => {
    const at = async (column: number) =>
      (await opened([full], { window: { column, row: 0, width: 4, height: 4 } })).files[0].sha256;
    expect(await at(0)).toBe(await at(1));
    expect(await at(0)).not.toBe(await at(20));
  });
});

describe('overviews', () => {
  test.each([
    [960, 1, 0],
    [959, 2, 1],
    [240, 2, 1],
    [239, 4, 2],
    [60, 4, 2],
  ])('a budget of %i cells takes the one by %i', async (cellBudget, factor, level) => {
    const terrain = await opened([full], { cellBudget });
    expect([terrain.grid.width, terrain.grid.height]).toEqual([40 / factor, 24 / factor]);
    expect(terrain.georeference).toMatchObject({
      west: 1000,
      north: 2000,
      cellWidth: 10 * factor,
      cellHeight: 10 * factor,
    });
    if (level === 0) expect(terrain.notices).toEqual([]);
    else {
      expect(terrain.grid.elevationM.every((z) => z === factor)).toBe(true);
      expect(terrain.notices[0]).toEqual({
        kind: 'overview',
        message: `Overview ${level} was read, with cells of ${10 * factor} × ${10 * factor}; how it was averaged is not known, so every result is an estimate.`,
      });
    }
  });

  test('within a window', async () => {
    const options = { window: { column: 8, row: 4, width: 16, height: 8 }, cellBudget: 40 };
    const { grid, georeference } = await opened([full], options);
    expect([grid.width, grid.height]).toEqual([8, 4]);
    expect(georeference).toMatchObject({ west: 1080, north: 1960, cellWidth: 20 });
  });

  test('none small enough', async () => {
    expect(await refusal(opened([full], { cellBudget: 59 }))).toBe(
      'bad-input: The terrain has 960 cells and 60 in its coarsest overview; the budget is 59, so raise it (--cell-budget), give a smaller extent (--extent) or add overviews to the file.',
    );
  });

  test('a budget above the limit is not at fault', async () => {
    expect(await refusal(opened([full], { cellBudget: 70, limits: { cells: 59 } }))).toBe(
      'too-large: The terrain has 960 cells and 60 in its coarsest overview; at most 59 are read, so give a smaller extent (--extent) or add overviews to the file.',
    );
  });

  test('of a mosaic', async () => {
    const right: TiffSpec = { ...full, place: [1400, 2000, 10, 10] };
    const { grid, georeference } = await opened([full, right], { cellBudget: 500 });
    expect([grid.width, grid.height]).toEqual([40, 12]);
    expect(georeference.cellWidth).toBe(20);
  });
});

describe('progress and cancel', () => {
  test('progress counts cells and ends at 1', async () => {
    const seen: number[] = [];
    await opened([{ ...full, deflate: true }], { progress: (fraction) => seen.push(fraction) });
    expect(seen).toEqual([16 / 24, 1]);
  });

  test('cancelled before and while reading', async () => {
    const stop = new AbortController();
    const sentence = 'cancelled: Reading the terrain was cancelled; nothing was kept.';
    const reading = opened([{ ...full, deflate: true }], {
      signal: stop.signal,
      progress: () => stop.abort(),
    });
    expect(await refusal(reading)).toBe(sentence);
    expect(await refusal(opened([full], { signal: stop.signal }))).toBe(sentence);
  });

  test('sources are closed, after a failure too', async () => {
    let closed = 0;
    const source = (bytes: Uint8Array) => ({
      ...memorySource('a.tif', bytes),
      close: async () => void closed++,
    });
    await openTerrain([source(tiffBytes(full))]);
    await refusal(openTerrain([source(new Uint8Array(100))]));
    expect(closed).toBe(2);
  });
});
