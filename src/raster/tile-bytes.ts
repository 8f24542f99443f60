import type { Level } from './raster-out.ts';

/** The quiet NaN that every NaN is written as, since its payload may differ between machines. */
const nanBits = 0x7fc00000;

/**
 * One tile of a level, ready to be deflated: samples differenced along each row, little-endian.
 * Floats by TIFF Technical Note 3 (2005, predictor 3): bytes of a row sorted by significance, most significant
 * first, then differenced byte by byte. Integers by TIFF 6.0 section 14 (predictor 2).
 * Cells beyond the level repeat its last column and row, as TIFF 6.0 section 15 advises for compression.
 */
export function tileBytes(
  level: Level,
  tileColumn: number,
  tileRow: number,
  tileWidth: number,
  tileHeight: number,
): Uint8Array {
  const { samples } = level;
  const size = samples.BYTES_PER_ELEMENT;
  const bytes = new Uint8Array(tileWidth * tileHeight * size);
  const bits =
    samples instanceof Float32Array
      ? new Uint32Array(samples.buffer, samples.byteOffset, samples.length)
      : samples;
  const floats = samples instanceof Float32Array ? samples : null;
  const line = new Uint32Array(tileWidth);
  for (let row = 0; row < tileHeight; row++) {
    const start = Math.min(tileRow * tileHeight + row, level.height - 1) * level.width;
    for (let column = 0; column < tileWidth; column++) {
      const cell = start + Math.min(tileColumn * tileWidth + column, level.width - 1);
      line[column] = floats !== null && Number.isNaN(floats[cell]) ? nanBits : bits[cell];
    }
    const target = bytes.subarray(row * tileWidth * size, (row + 1) * tileWidth * size);
    if (floats !== null) differencedFloats(line, target);
    else if (size === 4) differencedWords(line, target);
    else differencedBytes(line, target);
  }
  return bytes;
}

function differencedFloats(line: Uint32Array, target: Uint8Array): void {
  const width = line.length;
  let before = 0;
  for (let plane = 0; plane < 4; plane++) {
    const shift = 24 - 8 * plane;
    for (let i = 0; i < width; i++) {
      const byte = (line[i] >>> shift) & 255;
      target[plane * width + i] = byte - before;
      before = byte;
    }
  }
}

function differencedWords(line: Uint32Array, target: Uint8Array): void {
  let before = 0;
  for (let i = 0; i < line.length; i++) {
    const difference = line[i] - before;
    before = line[i];
    target[4 * i] = difference;
    target[4 * i + 1] = difference >> 8;
    target[4 * i + 2] = difference >> 16;
    target[4 * i + 3] = difference >> 24;
  }
}

function differencedBytes(line: Uint32Array, target: Uint8Array): void {
  let before = 0;
  for (let i = 0; i < line.length; i++) {
    target[i] = line[i] - before;
    before = line[i];
  }
}
