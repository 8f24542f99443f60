import { isVoid, type Level, type Samples } from './raster-out.ts';

/**
 * How four cells become one of an overview. Voids take no part; four voids make a void.
 * `mean`: a smooth picture, an estimate only · `min`, `max`: a bound of what lies below · `nearest`: the first
 * valid cell in reading order, so that no new value appears (ids, classes).
 */
export type OverviewRule = 'mean' | 'min' | 'max' | 'nearest';

/** The raster and its overviews, each half the one before (rounded up), until one fits into a tile. */
export function pyramid(
  full: Level,
  tileWidth: number,
  tileHeight: number,
  rule: OverviewRule,
  noData: number | null,
): Level[] {
  const levels = [full];
  let last = full;
  while (last.width > tileWidth || last.height > tileHeight) {
    last = halved(last, rule, noData);
    levels.push(last);
  }
  return levels;
}

function halved(level: Level, rule: OverviewRule, noData: number | null): Level {
  const width = Math.ceil(level.width / 2);
  const height = Math.ceil(level.height / 2);
  const samples = sameType(level.samples, width * height);
  const ofFour = merges[rule];
  const whole = !(samples instanceof Float32Array);
  const four = new Float64Array(4);
  for (let row = 0; row < height; row++) {
    const lastRow = Math.min(2 * row + 1, level.height - 1);
    for (let column = 0; column < width; column++) {
      const lastColumn = Math.min(2 * column + 1, level.width - 1);
      let count = 0;
      for (let r = 2 * row; r <= lastRow; r++) {
        for (let c = 2 * column; c <= lastColumn; c++) {
          const sample = level.samples[r * level.width + c];
          if (!isVoid(sample, noData)) four[count++] = sample;
        }
      }
      const merged = count > 0 ? ofFour(four, count) : (noData ?? Number.NaN);
      samples[row * width + column] = whole ? Math.round(merged) : merged;
    }
  }
  return { width, height, samples };
}

const merges: Record<OverviewRule, (samples: Float64Array, count: number) => number> = {
  mean(samples, count) {
    let sum = 0;
    for (let i = 0; i < count; i++) sum += samples[i];
    return sum / count;
  },
  min(samples, count) {
    let least = samples[0];
    for (let i = 1; i < count; i++) least = Math.min(least, samples[i]);
    return least;
  },
  max(samples, count) {
    let greatest = samples[0];
    for (let i = 1; i < count; i++) greatest = Math.max(greatest, samples[i]);
    return greatest;
  },
  nearest(samples) {
    return samples[0];
  },
};

function sameType(samples: Samples, length: number): Samples {
  if (samples instanceof Float32Array) return new Float32Array(length);
  return samples instanceof Uint32Array ? new Uint32Array(length) : new Uint8Array(length);
}
