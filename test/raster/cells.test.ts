import { describe, expect, test } from 'vitest';
import { opened, plane, ramp, refusal } from './open.ts';
import { type Sample, type Tag, type TiffSpec, tiffBytes } from './tiff-builder.ts';

const small: TiffSpec = { width: 5, height: 4, values: ramp(5, 4) };
const text = (values: string): Tag => ({ type: 2, values });
const short = (...values: number[]): Tag => ({ type: 3, values });

describe('every way of storing the same cells gives the same terrain', () => {
  const types: Sample[] = ['uint8', 'uint16', 'int8', 'int16', 'int32', 'uint32', 'float32', 'float64'];
  const layouts: Partial<TiffSpec>[] = [
    {},
    { rowsPerStrip: 1 },
    { rowsPerStrip: 3 },
    { tile: [2, 3] },
    { tile: [16, 16] },
  ];
  const cases = types.flatMap((type) =>
    layouts.flatMap((layout) =>
      [true, false].flatMap((littleEndian) =>
        [true, false].map((big) => ({
          ...small,
          type,
          ...layout,
          littleEndian,
          big,
          deflate: big !== littleEndian,
        })),
      ),
    ),
  );

  test(`${cases.length} combinations of type, layout, byte order, BigTIFF and packing`, async () => {
    const { sha256, files } = await opened([small]);
    for (const spec of cases) {
      const terrain = await opened([spec]);
      const how = JSON.stringify({ ...spec, values: undefined });
      expect(Array.from(terrain.grid.elevationM), how).toEqual(small.values);
      expect(terrain.sha256, how).toBe(sha256);
      expect(terrain.files[0].hashOf).toBe('file');
    }
    expect(files[0].sha256).not.toBe((await opened([{ ...small, big: true }])).files[0].sha256);
  });

  test('the hash of a file read whole is the SHA-256 of its bytes', async () => {
    const bytes = tiffBytes(small);
    const digest = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes as Uint8Array<ArrayBuffer>));
    expect((await opened([bytes])).files[0].sha256).toBe(Buffer.from(digest).toString('hex'));
  });

  test('another cell, place or CRS is another terrain', async () => {
    const same = await opened([small]);
    const others: TiffSpec[] = [
      { ...small, values: [...ramp(5, 4).slice(0, 19), 20] },
      { ...small, place: [500000, 5600002, 2, 2] },
      {
        ...small,
        keys: [
          [1024, 1],
          [3072, 32632],
          [4099, 9001],
        ],
      },
    ];
    for (const other of others) expect((await opened([other])).sha256).not.toBe(same.sha256);
  });

  test('a block that is not in the file is void', async () => {
    const places = { 273: { type: 4, values: [8, 0] }, 279: { type: 4, values: [40, 0] } } as const;
    const { grid } = await opened([{ ...small, rowsPerStrip: 2, tags: places }]);
    expect(Array.from(grid.elevationM.subarray(0, 10))).toEqual(ramp(5, 2));
    expect(grid.elevationM.subarray(10).every(Number.isNaN)).toBe(true);
  });
});

describe('what values mean', () => {
  const cells = async (spec: Partial<TiffSpec>) =>
    Array.from((await opened([{ ...small, ...spec }])).grid.elevationM);

  test('no-data as a number, with spaces, as nan and as infinity', async () => {
    const gone = plane(5, 4, (c, r) => (r * 5 + c === 7 ? Number.NaN : r * 5 + c));
    expect(await cells({ type: 'int16', tags: { 42113: text('7') } })).toEqual(gone);
    expect(await cells({ tags: { 42113: text(' 7.0 ') } })).toEqual(gone);
    expect(await cells({ values: gone, tags: { 42113: text('nan') } })).toEqual(gone);
    expect(await cells({ values: gone })).toEqual(gone);
    const below = gone.map((z) => (Number.isNaN(z) ? Number.NEGATIVE_INFINITY : z));
    expect(await cells({ values: below, tags: { 42113: text('-inf') } })).toEqual(gone);
  });

  test('a no-data value that float32 cannot hold exactly, as text of 64 bits', async () => {
    const values = small.values as number[];
    for (const word of ['-9999.1', '-3.402823466385289e+38', '-3.4028235e+38', '-3.40282347e+38']) {
      const stored = Math.max(Math.fround(Number(word)), -3.4028234663852886e38);
      const [first, ...rest] = await cells({
        values: [stored, ...values.slice(1)],
        tags: { 42113: text(word) },
      });
      expect(first, word).toBeNaN();
      expect(rest).toEqual(values.slice(1));
    }
  });

  test('scale and offset, with no-data compared before them', async () => {
    const xml =
      '<M><Item name="OFFSET" sample="0" role="offset">-100</Item>\n<Item name="SCALE" sample="0" role="scale">0.5</Item></M>';
    const expected = plane(5, 4, (c, r) => (r * 5 + c === 3 ? Number.NaN : (r * 5 + c) / 2 - 100));
    expect(await cells({ type: 'uint16', tags: { 42112: text(xml), 42113: text('3') } })).toEqual(expected);
  });

  test('negative zero becomes zero', async () => {
    expect(Object.is((await cells({ values: [-0, ...ramp(5, 4).slice(1)] }))[0], 0)).toBe(true);
  });

  test.each([
    [
      { 42113: text('none') },
      'unreadable: a.tif gives "none" as its no-data value (tag 42113); expected a number, so write the file anew.',
    ],
    [
      { 42112: text('<M><Item role="scale">big</Item></M>') },
      'unreadable: a.tif gives "big" as the scale of its values (tag 42112); expected a number, so write the file anew.',
    ],
  ])('%j is refused', async (tags, sentence) => {
    expect(await refusal(opened([{ ...small, tags }]))).toBe(sentence);
  });

  test('infinity, and a number beyond float32', async () => {
    const with7 = (z: number) => (small.values as number[]).map((v) => (v === 7 ? z : v));
    const sentence =
      'unreadable: The elevation at column 2, row 1 is Infinity; expected a finite number of metres or a void, so declare the value as no-data or mend the file.';
    expect(await refusal(opened([{ ...small, values: with7(Number.POSITIVE_INFINITY) }]))).toBe(sentence);
    expect(await refusal(opened([{ ...small, type: 'float64', values: with7(1e300) }]))).toBe(sentence);
  });

  test('all void', async () => {
    const values = plane(5, 4, () => Number.NaN);
    expect(await refusal(opened([{ ...small, values }]))).toBe(
      'unreadable: All 20 cells are void; expected at least one elevation, so check the extent and the no-data value.',
    );
  });
});

describe('what is stored in a way that is not read', () => {
  const mask = (): TiffSpec => ({
    ...small,
    overviews: [{ ...small, tags: { 254: { type: 4, values: [4] } } }],
  });
  const second = (): TiffSpec => ({
    ...small,
    overviews: [{ ...small, tags: { 254: { type: 4, values: [0] } } }],
  });
  const compressed = (code: number, name: string): [string, TiffSpec, string] => [
    `compression ${code}`,
    { ...small, tags: { 259: short(code) } },
    `a.tif is compressed by method ${code} (${name}); expected none, LZW, deflate, PackBits or Zstandard, so write it anew with deflate.`,
  ];
  test.each<[string, TiffSpec, string]>([
    compressed(7, 'JPEG'),
    compressed(34887, 'LERC'),
    compressed(50001, 'WebP'),
    compressed(12345, 'unknown'),
    [
      'three bands',
      { ...small, tags: { 277: short(3) } },
      'a.tif has 3 bands; expected one band of elevations, so write that band to a file of its own.',
    ],
    [
      'a palette',
      { ...small, tags: { 262: short(3) } },
      'a.tif holds colours of a palette; expected elevations, so open the elevation file, not its picture.',
    ],
    [
      '1 bit',
      { ...small, tags: { 258: short(1), 339: short(1) } },
      'a.tif holds unsigned values of 1 bits; expected integers of 8, 16 or 32 or floating point of 16, 32 or 64 bits, so write it anew.',
    ],
    [
      'complex',
      { ...small, tags: { 258: short(64), 339: short(6) } },
      'a.tif holds format 6 values of 64 bits; expected integers of 8, 16 or 32 or floating point of 16, 32 or 64 bits, so write it anew.',
    ],
    [
      'an orientation',
      { ...small, tags: { 274: short(4) } },
      'a.tif is stored with orientation 4; expected 1 (first row on top, first column left), so write it anew.',
    ],
    [
      'a predictor',
      { ...small, type: 'int16', tags: { 317: short(3) } },
      'a.tif uses predictor 3 on int16 values; expected 1, 2 or (floating point) 3, so write it anew.',
    ],
    [
      'a mask',
      mask(),
      'a.tif marks its voids by a mask image; expected a no-data value, so write it anew with one.',
    ],
    [
      'two images',
      second(),
      'a.tif holds 2 images; expected one with or without overviews, so write it to a file of its own.',
    ],
  ])('%s', async (_, spec, sentence) => {
    expect(await refusal(opened([spec]))).toBe(`unsupported: ${sentence}`);
  });
});
