import { OverbrimError } from '../../src/core/error.ts';
import { memorySource } from '../../src/raster/byte-source.ts';
import { type OpenOptions, openTerrain } from '../../src/raster/open-terrain.ts';
import type { Terrain } from '../../src/raster/terrain.ts';
import { type TiffSpec, tiffBytes } from './tiff-builder.ts';

/** Opens files made on the spot, named a.tif, b.tif, … */
export function opened(specs: readonly (TiffSpec | Uint8Array)[], options?: OpenOptions): Promise<Terrain> {
  const sources = specs.map((spec, i) =>
    memorySource(`${'abcdefgh'[i]}.tif`, spec instanceof Uint8Array ? spec : tiffBytes(spec)),
  );
  return openTerrain(sources, options);
}

/** Code and sentence of the refusal; fails when there is none, or another kind of error. */
export async function refusal(work: Promise<unknown>): Promise<string> {
  try {
    await work;
  } catch (error) {
    if (error instanceof OverbrimError) return `${error.code}: ${error.message}`;
    throw error;
  }
  throw new Error('Nothing was refused.');
}

/** A plane of `width × height` cells. */
export function plane(width: number, height: number, of: (column: number, row: number) => number): number[] {
  return Array.from({ length: width * height }, (_, i) => of(i % width, Math.floor(i / width)));
}

export const ramp = (width: number, height: number): number[] =>
  plane(width, height, (c, r) => r * width + c);
