import { readFileSync } from 'node:fs';
import { fromArrayBuffer } from 'geotiff';
import { fractal, randomFrom } from './fractal.ts';

/** Makes ground of `side × side` cells for a bench: float32 metres, row-major, no voids, the same on every machine. */
export type TerrainMaker = (side: number) => Float32Array | Promise<Float32Array>;

const seed = 20240229;

/** Rough ground with a little white noise, as lidar gives it: many small pits. */
export function noisy(side: number): Float32Array {
  const z = fractal(side, seed, 200, 0.6);
  const random = randomFrom(seed + 1);
  for (let i = 0; i < z.length; i++) z[i] += (random() + random() - 1) * 0.1;
  return z;
}

/** The same in whole metres: ties and flats everywhere. */
export function wholeMetres(side: number): Float32Array {
  return noisy(side).map((z) => Math.round(z) + 0);
}

/** Lakes flattened to one level each, as mapping agencies deliver them, in rough ground. */
export function flattenedLakes(side: number): Float32Array {
  const z = noisy(side);
  const random = randomFrom(seed + 2);
  const block = 256;
  for (let top = 0; top + block <= side; top += block) {
    for (let left = 0; left + block <= side; left += block) {
      const middle = (top + block / 2) * side + left + block / 2;
      const level = z[middle] + random() * 4;
      const radius = (0.2 + 0.25 * random()) * block;
      for (let row = 0; row < block; row++) {
        for (let column = 0; column < block; column++) {
          const at = (top + row) * side + left + column;
          const fromMiddle = (row - block / 2) ** 2 + (column - block / 2) ** 2;
          if (fromMiddle < radius * radius && z[at] < level) z[at] = level;
        }
      }
    }
  }
  return z;
}

/** Gentle ground without detail below 64 cells: few, large depressions. */
export function smooth(side: number): Float32Array {
  return fractal(side, seed + 3, 200, 0.5, 64);
}

/** The middle of the relief of the earth and its sea floor at 20′ (test/data/etopo20.tif), enlarged bilinearly. */
export async function enlargedRelief(side: number): Promise<Float32Array> {
  const bytes = readFileSync(new URL('../data/etopo20.tif', import.meta.url));
  const tiff = await fromArrayBuffer(new Uint8Array(bytes).buffer);
  const image = await tiff.getImage();
  const from = image.getHeight();
  const left = Math.floor((image.getWidth() - from) / 2);
  const [relief] = await image.readRasters({ window: [left, 0, left + from, from] });
  if (!(relief instanceof Float32Array)) throw new Error('The relief is not float32.');
  const z = new Float32Array(side * side);
  const step = (from - 1) / (side - 1);
  for (let row = 0; row < side; row++) {
    const y = Math.min(Math.floor(row * step), from - 2);
    const down = row * step - y;
    for (let column = 0; column < side; column++) {
      const x = Math.min(Math.floor(column * step), from - 2);
      const right = column * step - x;
      const at = y * from + x;
      const above = relief[at] + (relief[at + 1] - relief[at]) * right;
      const below = relief[at + from] + (relief[at + from + 1] - relief[at + from]) * right;
      z[row * side + column] = above + (below - above) * down;
    }
  }
  return z;
}

export const terrains: Readonly<Record<string, TerrainMaker>> = {
  noisy,
  'whole-metres': wholeMetres,
  'flattened-lakes': flattenedLakes,
  smooth,
  'enlarged-relief': enlargedRelief,
};
