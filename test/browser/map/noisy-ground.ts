import { samplesFile } from '../../processes/made-terrain.ts';

/** Invented ground of 240 × 180 cells of 5 m in UTM zone 33, with many ponds, a void and a hole in it. */
export async function noisyGround(): Promise<Uint8Array> {
  const width = 240;
  const height = 180;
  let state = 20260;
  const random = (): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
  const samples = new Float32Array(width * height);
  for (let row = 0; row < height; row++) {
    for (let column = 0; column < width; column++) {
      const wave = Math.sin(column / 9) * Math.cos(row / 11) + Math.sin((column + 2 * row) / 23);
      const isVoid = Math.hypot(column - 170, row - 60) < 12 && Math.hypot(column - 170, row - 60) > 5;
      samples[row * width + column] = isVoid ? Number.NaN : 100 + 2 * wave + 0.6 * random();
    }
  }
  return samplesFile(width, height, samples, { epsg: 32633, west: 430_000, north: 5_300_000, cellSize: 5 });
}

/** Its middle, longitude and latitude. */
export const middle: [number, number] = [14.066, 47.848];
/** A place on it, in its CRS. */
export const start = '430400,5299700';
