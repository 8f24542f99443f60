import { describe, expect, test } from 'vitest';
import { opened, plane, ramp, refusal } from './open.ts';
import { type TiffSpec, utmMetres } from './tiff-builder.ts';

/** Even ground that rises by 1 m a cell to the east and 3 m to the south, seen through a tile whose corner is at (column, row). */
function tile(column: number, row: number, width: number, height: number, lift = 0): TiffSpec {
  return {
    width,
    height,
    values: plane(width, height, (c, r) => column + c + 3 * (row + r) + lift),
    place: [500000 + 2 * column, 5600000 - 2 * row, 2, 2],
  };
}

describe('several files on one grid', () => {
  test('four tiles make the same terrain as one file, in any order', async () => {
    const whole = await opened([tile(0, 0, 20, 16)]);
    const tiles = [tile(0, 0, 12, 10), tile(12, 0, 8, 10), tile(0, 10, 12, 6), tile(12, 10, 8, 6)];
    for (const order of [tiles, [...tiles].reverse()]) {
      const terrain = await opened(order);
      expect(terrain.sha256).toBe(whole.sha256);
      expect(terrain.notices).toEqual([]);
      expect(terrain.grid.gaps).toEqual([]);
      expect(terrain.files).toHaveLength(4);
    }
  });

  test('where files overlap the first named wins, but a void never does', async () => {
    const low = { ...tile(0, 0, 4, 2), values: [1, 1, 1, 1, 1, Number.NaN, 1, Number.NaN] };
    const high = { ...tile(2, 0, 4, 2), values: plane(4, 2, () => 2) };
    expect(Array.from((await opened([low, high])).grid.elevationM)).toEqual([
      1,
      1,
      1,
      1,
      2,
      2,
      1,
      Number.NaN,
      1,
      2,
      2,
      2,
    ]);
    expect(Array.from((await opened([high, low])).grid.elevationM)).toEqual([
      1,
      1,
      2,
      2,
      2,
      2,
      1,
      Number.NaN,
      2,
      2,
      2,
      2,
    ]);
  });

  test('tiles in different vertical units of one datum', async () => {
    const keys = (code: number) => [...utmMetres.slice(0, 3), [4096, code]] as const;
    const metres = { ...tile(0, 0, 2, 1), values: [10, 20], keys: keys(5703) };
    const feet = { ...tile(2, 0, 2, 1), values: [100, 200], keys: keys(8228) };
    const terrain = await opened([metres, feet]);
    expect(terrain.grid.elevationM).toEqual(Float32Array.of(10, 20, 30.48, 60.96));
    expect(terrain.verticalDatum).toBe('North American Vertical Datum 1988');
  });

  test('off by less than a thousandth of a cell is on the grid', async () => {
    const near = tile(5, 0, 5, 5);
    const terrain = await opened([tile(0, 0, 5, 5), { ...near, place: [500010.0018, 5600000, 2, 2] }]);
    expect([terrain.grid.width, terrain.grid.height]).toEqual([10, 5]);
  });
});

describe('files that do not fit together', () => {
  const first = tile(0, 0, 5, 5);
  const next = tile(5, 0, 5, 5);
  test.each<[string, TiffSpec, string]>([
    [
      'cell size',
      { ...next, place: [500010, 5600000, 1, 1] },
      'b.tif has cells of 1 × 1; expected 2 × 2 as in a.tif, so warp it to the same grid first.',
    ],
    [
      'alignment',
      { ...next, place: [500010.5, 5600000, 2, 2] },
      'b.tif lies 0.250 of a cell off the grid; expected at most 0.001 as in a.tif, so warp it to the same grid first.',
    ],
    [
      'CRS',
      {
        ...next,
        keys: [
          [1024, 1],
          [3072, 32632],
          [4099, 9001],
        ],
      },
      'b.tif is in WGS 84 / UTM zone 32N; expected WGS 84 / UTM zone 31N as in a.tif, so warp it to the same grid first.',
    ],
  ])('another %s', async (_, other, sentence) => {
    expect(await refusal(opened([first, other]))).toBe(`unsupported: ${sentence}`);
  });

  test('another vertical datum', async () => {
    const keys = (code: number) => [...utmMetres, [4096, code]] as const;
    expect(
      await refusal(
        opened([
          { ...first, keys: keys(5703) },
          { ...next, keys: keys(3855) },
        ]),
      ),
    ).toBe(
      'unsupported: b.tif has heights above EGM2008 geoid and other files above North American Vertical Datum 1988, which may differ by metres; bring all to one vertical datum first.',
    );
  });

  test('one that does not tell its datum is taken, and it is said', async () => {
    const told = { ...next, keys: [...utmMetres, [4096, 5703]] as const };
    const terrain = await opened([first, told]);
    expect(terrain.verticalDatum).toBe('North American Vertical Datum 1988');
    expect(terrain.notices).toEqual([
      {
        kind: 'vertical-datum',
        message: 'a.tif tells no vertical datum; it was taken to be that of the other files.',
      },
    ]);
  });

  test('tiles so far apart that the grid between them is too large', async () => {
    expect(await refusal(opened([first, tile(50_000, 50_000, 5, 5)]))).toBe(
      'too-large: The terrain has 50005 × 50005 = 2500500025 cells; at most 100000000 are read, so give an extent (--extent) or a cell budget (--cell-budget).',
    );
  });

  test('no file', async () => {
    expect(await refusal(opened([]))).toBe('bad-input: No elevation file was given; name at least one.');
  });
});

describe('gaps between tiles', () => {
  test('are reported by place, stay void, and go with the grid', async () => {
    const terrain = await opened([tile(0, 0, 10, 8), tile(12, 2, 6, 8)]);
    expect(terrain.grid.gaps).toEqual([{ column: 10, row: 2, width: 2, height: 6 }]);
    expect(terrain.notices).toEqual([
      {
        kind: 'gap',
        message:
          'Between a.tif and b.tif lies a gap of 2 × 6 cells at column 10, row 2 (500020 to 500024 east, 5599984 to 5599996 north); it is taken as a wall unless gaps are declared open (--gaps open), so name a file that covers it.',
      },
    ]);
    expect(terrain.grid.elevationM[2 * 18 + 10]).toBeNaN();
  });

  test('up to three cells wide, no more, in both directions', async () => {
    for (const width of [1, 2, 3]) {
      expect((await opened([tile(0, 0, 5, 5), tile(5 + width, 0, 5, 5)])).grid.gaps).toEqual([
        { column: 5, row: 0, width, height: 5 },
      ]);
      expect((await opened([tile(0, 0, 5, 5), tile(0, 5 + width, 5, 5)])).grid.gaps).toEqual([
        { column: 0, row: 5, width: 5, height: width },
      ]);
    }
    expect((await opened([tile(0, 0, 5, 5), tile(9, 0, 5, 5)])).grid.gaps).toEqual([]);
  });

  test('where four tiles leave a cross, its middle belongs to it, told once', async () => {
    const tiles = [tile(0, 0, 4, 4), tile(5, 0, 4, 4), tile(0, 5, 4, 4), tile(5, 5, 4, 4)];
    const { grid, notices } = await opened(tiles);
    const covered = new Set(
      grid.gaps.flatMap(({ column, row, width, height }) =>
        plane(width, height, (c, r) => (row + r) * 9 + column + c),
      ),
    );
    expect(covered.size).toBe(9 + 9 - 1);
    // The corner was once told twice, by both pairs of tiles that face each other across it.
    expect(grid.gaps.reduce((sum, { width, height }) => sum + width * height, 0)).toBe(covered.size);
    expect(notices.filter(({ kind }) => kind === 'gap')).toHaveLength(5);
    for (const cell of covered) expect(grid.elevationM[cell]).toBeNaN();
  });

  test('what a third tile covers is no gap', async () => {
    const { grid } = await opened([tile(0, 0, 4, 6), tile(6, 0, 4, 6), tile(3, 2, 4, 2)]);
    expect(grid.gaps).toEqual([
      { column: 4, row: 0, width: 2, height: 2 },
      { column: 4, row: 4, width: 2, height: 2 },
    ]);
  });

  test('a window moves them along', async () => {
    const options = { window: { column: 8, row: 1, width: 6, height: 4 } };
    const { grid } = await opened([tile(0, 0, 10, 8), tile(11, 0, 6, 8)], options);
    expect(grid.gaps).toEqual([{ column: 2, row: 0, width: 1, height: 4 }]);
  });
});

/** 0 to 10 m, without any order. */
function noise(column: number, row: number): number {
  const mixed = Math.imul((column * 374761393 + row * 668265263) ^ 0x5bd1e995, 1274126177);
  return (((mixed ^ (mixed >>> 15)) >>> 0) % 1000) / 100;
}

describe('steps along seams', () => {
  test('a tile that lies too high is named with the height of the step', async () => {
    const { notices } = await opened([tile(0, 0, 12, 16), tile(12, 0, 12, 16, 0.5)]);
    expect(notices.map(({ kind }) => kind)).toEqual(['seam-step']);
    expect(notices[0].message).toMatch(
      /^b\.tif lies 0\.50 m higher than a\.tif along their seam \(median of 16 pairs of cells; the ground beside it varies by 0\.00 m\), so check their vertical datums\.$/,
    );
  });

  test('also between rows, also lower, also under an overlap', async () => {
    const below = await opened([tile(0, 0, 16, 12), tile(0, 12, 16, 12, -0.4)]);
    expect(below.notices[0].message).toMatch(/^b\.tif lies 0\.40 m lower than a\.tif /);
    const overlap = await opened([tile(0, 0, 16, 16), tile(10, 0, 16, 16, 0.5)]);
    expect(overlap.notices[0].message).toMatch(/^b\.tif lies 0\.50 m higher than a\.tif /);
  });

  test('slope, and less than the ground varies or than 5 cm, is no step', async () => {
    expect((await opened([tile(0, 0, 12, 16), tile(12, 0, 12, 16, 0.02)])).notices).toEqual([]);
    const rough = (column: number, lift: number): TiffSpec => ({
      ...tile(column, 0, 12, 16),
      values: plane(12, 16, (c, r) => noise(c + column, r) + lift),
    });
    expect((await opened([rough(0, 0), rough(12, 0.5)])).notices).toEqual([]);
  });

  test('too short a seam tells nothing', async () => {
    expect((await opened([tile(0, 0, 12, 7), tile(12, 0, 12, 7, 5)])).notices).toEqual([]);
    expect((await opened([{ width: 1, height: 1, values: ramp(1, 1) }])).notices).toEqual([]);
  });
});
