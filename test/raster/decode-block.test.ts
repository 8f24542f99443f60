import { zlibSync } from 'fflate';
import { getDecoder } from 'geotiff';
import { describe, expect, test } from 'vitest';
import { type BlockFormat, decodeBlock } from '../../src/raster/decode-block.ts';
import { decodeLzw } from '../../src/raster/lzw.ts';
import { decodePackBits } from '../../src/raster/pack-bits.ts';
import { refusal } from './open.ts';

const format = (compression: number): BlockFormat => ({
  name: 'a.tif',
  compression,
  predictor: 1,
  rowCells: 10,
  sampleBytes: 1,
  littleEndian: true,
});

/** 9-bit codes, high bit first; no table ever grows past 9 bits in so few. */
function lzwCodes(...codes: number[]): Uint8Array {
  const bits = codes.map((code) => code.toString(2).padStart(9, '0')).join('');
  return Uint8Array.from(bits.padEnd(Math.ceil(bits.length / 8) * 8, '0').match(/.{8}/g) ?? [], (byte) =>
    Number.parseInt(byte, 2),
  );
}

describe('no method unfolds beyond the size of its block', () => {
  test('deflate: a megabyte of zeros in a block of 100 bytes', async () => {
    const bytes = await decodeBlock(zlibSync(new Uint8Array(2 ** 20)), format(8), 100);
    expect(bytes).toEqual(new Uint8Array(100));
    expect(bytes.buffer.byteLength).toBe(100);
  });

  test('LZW: strings that grow with every code', async () => {
    const codes = [256, 65, ...Array.from({ length: 200 }, (_, i) => 258 + i)];
    expect(decodeLzw(lzwCodes(...codes), 1000)).toEqual(new Uint8Array(1000).fill(65));
    expect(decodeLzw(lzwCodes(256, 65, 258, 259, 257), 1000)).toEqual(new Uint8Array(6).fill(65));
  });

  test('PackBits: the longest runs', () => {
    const runs = Uint8Array.from({ length: 200 }, (_, i) => (i % 2 ? 7 : 129));
    expect(decodePackBits(runs, 130)).toEqual(new Uint8Array(130).fill(7));
  });

  // A raw Zstandard frame (RFC 8878): no content size, one last run-length block of 100,000 times the byte 5.
  const frame = Uint8Array.of(
    0x28,
    0xb5,
    0x2f,
    0xfd,
    0x00,
    0x60,
    0x03 | ((100_000 << 3) & 0xff),
    (100_000 >> 5) & 0xff,
    (100_000 >> 13) & 0xff,
    5,
  );
  test('Zstandard: a long run', async () => {
    expect(await decodeBlock(frame, format(50000), 100_000)).toEqual(new Uint8Array(100_000).fill(5));
    expect(await refusal(decodeBlock(frame, format(50000), 100))).toBe(
      'unreadable: A block of a.tif cannot be unpacked to its full length; the file is truncated or damaged, so fetch it again.',
    );
  });
});

describe('damaged blocks are refused', () => {
  test.each([1, 5, 8, 32773, 50000])('method %i', async (method) => {
    expect(await refusal(decodeBlock(Uint8Array.of(1, 2, 3), format(method), 100))).toMatch(
      /^unreadable: A block of a\.tif cannot be unpacked /,
    );
  });
});

test('LZW and PackBits as the geotiff library decodes them', async () => {
  const whole = { tileWidth: 1, tileHeight: 1, predictor: 1, bitsPerSample: 8, planarConfiguration: 1 };
  const theirs = async (method: number, data: Uint8Array) =>
    new Uint8Array(await (await getDecoder(method, whole)).decode(data.slice().buffer as ArrayBuffer));
  const lzw = lzwCodes(256, 84, 79, 66, 69, 258, 260, 259, 78, 264, 84, 257);
  expect(decodeLzw(lzw, 1000)).toEqual(await theirs(5, lzw));
  // Apple's example of PackBits, as TIFF 6.0 cites the method (bytes from memory).
  const packed = Uint8Array.of(
    0xfe,
    0xaa,
    0x02,
    0x80,
    0x00,
    0x2a,
    0xfd,
    0xaa,
    0x03,
    0x80,
    0x00,
    0x2a,
    0x22,
    0xf7,
    0xaa,
  );
  const unpacked = 'aaaaaa80002aaaaaaaaa80002a22aaaaaaaaaaaaaaaaaaaa';
  expect(Buffer.from(decodePackBits(packed, 1000)).toString('hex')).toBe(unpacked);
});
