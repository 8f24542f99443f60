import { describe, expect, test } from 'vitest';
import { opened, ramp, refusal } from './open.ts';
import { type TiffSpec, tiffBytes } from './tiff-builder.ts';

const small: TiffSpec = { width: 4, height: 3, values: ramp(4, 3) };
const text = (line: string) => new TextEncoder().encode(line);

describe('what is no sound TIFF file', () => {
  test('another kind of file', async () => {
    expect(await refusal(opened([text('column,row,elevation')]))).toBe(
      'unreadable: a.tif is not a TIFF file (it starts with bytes 63 6f 6c 75); expected a GeoTIFF of elevations.',
    );
  });

  test.each(['<!doctype html><p>no', '\n<?xml version="1.0"?>', '<html lang="en">'])(
    'a web page: %j',
    async (page) => {
      expect(await refusal(opened([text(page)]))).toBe(
        'unreadable: a.tif is a web page or other marked-up text, not a TIFF file; servers send one in place of a missing file, so check the address.',
      );
    },
  );

  test('an empty file', async () => {
    expect(await refusal(opened([new Uint8Array(0)]))).toBe(
      'unreadable: a.tif has only 0 bytes; expected a GeoTIFF file.',
    );
  });

  test('every truncation is refused, and none is read as a whole file', async () => {
    const whole = tiffBytes(small);
    for (let length = 0; length < whole.length; length++) {
      expect(await refusal(opened([whole.slice(0, length)])), `${length} bytes`).toMatch(
        /^(unreadable|unsupported): /,
      );
    }
  });

  test('truncated within the directory', async () => {
    const whole = tiffBytes(small);
    expect(await refusal(opened([whole.slice(0, whole.length - 10)]))).toBe(
      `unreadable: a.tif has ${whole.length - 10} bytes, but a directory of 14 entries should be 172 bytes from byte ${whole.length - 172} on; the file is truncated or damaged, so fetch it again.`,
    );
  });

  test('directories in a circle', async () => {
    expect(await refusal(opened([{ ...small, next: 'first' }]))).toMatch(
      /^unreadable: The directories of a\.tif form a circle \(byte \d+ is reached twice\); expected a chain with an end, so write the file anew\.$/,
    );
  });

  test('a chain that leads out of the file', async () => {
    expect(await refusal(opened([{ ...small, next: 4_000_000 }]))).toMatch(
      /^unreadable: a\.tif has \d+ bytes, but a directory should be 2 bytes from byte 4000000 on; /,
    );
  });

  test('a BigTIFF with offsets of another size', async () => {
    const bytes = tiffBytes({ ...small, big: true });
    bytes[4] = 4;
    expect(await refusal(opened([bytes]))).toBe(
      'unreadable: a.tif says that its BigTIFF offsets have 4 bytes; expected 8, so write the file anew.',
    );
  });
});

describe('limits, each hit on purpose', () => {
  test('directories', async () => {
    const overviews = Array.from({ length: 5 }, () => ({ width: 2, height: 2, values: ramp(2, 2) }));
    expect(await refusal(opened([{ ...small, overviews }], { limits: { directories: 5 } }))).toBe(
      'too-large: a.tif has more than 5 directories; expected one image with its overviews, so write the file anew.',
    );
    await opened([{ ...small, overviews }], { limits: { directories: 6 } });
  });

  test('entries of a directory', async () => {
    expect(await refusal(opened([small], { limits: { entries: 13 } }))).toBe(
      'too-large: A directory of a.tif claims 14 entries; expected at most 13, so write the file anew.',
    );
    await opened([small], { limits: { entries: 14 } });
  });

  test('bytes of one tag', async () => {
    const tags = { 42113: { type: 2, values: '-9999', count: 70_000_000 } } as const;
    expect(await refusal(opened([{ ...small, tags }]))).toBe(
      'too-large: Tag 42113 of a.tif claims 70000000 bytes; expected at most 67108864, so write the file anew.',
    );
  });

  test('values outside the file', async () => {
    const tags = { 42113: { type: 2, values: '-9999', count: 5000 } } as const;
    expect(await refusal(opened([{ ...small, tags }]))).toMatch(
      /^unreadable: a\.tif has \d+ bytes, but the values of tag 42113 should be 5000 bytes from byte \d+ on; /,
    );
  });

  test('bytes of one block once unpacked', async () => {
    expect(await refusal(opened([{ ...small, deflate: true }], { limits: { blockBytes: 47 } }))).toBe(
      'too-large: A block of a.tif unpacks to 48 bytes; expected at most 47, so write it anew in tiles.',
    );
    await opened([{ ...small, deflate: true }], { limits: { blockBytes: 48 } });
  });

  test('cells', async () => {
    expect(await refusal(opened([small], { limits: { cells: 11 } }))).toBe(
      'too-large: The terrain has 4 × 3 = 12 cells; at most 11 are read, so give an extent (--extent) or a cell budget (--cell-budget).',
    );
    await opened([small], { limits: { cells: 12 } });
  });
});

describe('a small file that claims a huge size', () => {
  const sized = (side: number, more: NonNullable<TiffSpec['tags']> = {}): NonNullable<TiffSpec['tags']> => ({
    256: { type: 4, values: [side] },
    257: { type: 4, values: [side] },
    278: { type: 4, values: [side] },
    ...more,
  });

  test('in one plain strip', async () => {
    const tags = sized(9000, { 279: { type: 4, values: [324_000_000] } });
    expect(await refusal(opened([{ ...small, tags }]))).toMatch(
      /^unreadable: a\.tif claims 9000 × 9000 cells but has only \d+ bytes; expected far more, so write the file anew\.$/,
    );
  });

  test('in a plain strip that ends outside the file', async () => {
    const tags = sized(900, { 279: { type: 4, values: [3_240_000] } });
    expect(await refusal(opened([{ ...small, tags }]))).toMatch(
      /^unreadable: a\.tif has \d+ bytes, but the block of row 0, column 0 should be 3240000 bytes from byte 8 on; /,
    );
  });

  test('in one packed strip of a gigabyte', async () => {
    expect(await refusal(opened([{ ...small, deflate: true, tags: sized(30_000) }]))).toBe(
      'too-large: A block of a.tif unpacks to 3600000000 bytes; expected at most 268435456, so write it anew in tiles.',
    );
  });

  test('in a packed strip that its method cannot unfold so far', async () => {
    expect(await refusal(opened([{ ...small, deflate: true, tags: sized(900) }]))).toMatch(
      /^unreadable: a\.tif claims that \d+ bytes unpack to 3240000; no file written by its method does, so write it anew\.$/,
    );
  });

  test('in blocks that it does not place', async () => {
    const tags = sized(900, { 278: { type: 4, values: [3] } });
    expect(await refusal(opened([{ ...small, tags }]))).toBe(
      'unreadable: a.tif claims 900 × 900 cells in 300 blocks but tag 273 places 1; the file is damaged, so write it anew.',
    );
  });

  test('with no cells at all', async () => {
    expect(await refusal(opened([{ ...small, tags: { 256: { type: 4, values: [0] } } }]))).toBe(
      'unreadable: a.tif claims 0 × 3 cells; expected at least 1 × 1, so write the file anew.',
    );
  });

  test('in a packed block that holds fewer bytes than it should', async () => {
    const tags = { 257: { type: 4, values: [4] }, 278: { type: 4, values: [4] } } as const;
    expect(await refusal(opened([{ ...small, deflate: true, tags }]))).toBe(
      'unreadable: A block of a.tif cannot be unpacked to its full length; the file is truncated or damaged, so fetch it again.',
    );
  });
});
