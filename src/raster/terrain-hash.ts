import { sha256Hex, sha256OfText } from './hash.ts';
import type { Georeference } from './terrain.ts';

/**
 * SHA-256 of what a terrain is, whatever file it came in: that of the text
 * `width height west north cellWidth cellHeight crs elevations`, one a line, where numbers are written in full,
 * crs is its proj4 definition and elevations the SHA-256 of the float32 values in the machine's byte order
 * (little-endian everywhere that matters).
 */
export async function terrainHash(
  width: number,
  height: number,
  { west, north, cellWidth, cellHeight, crs }: Georeference,
  elevationM: Float32Array,
): Promise<string> {
  const bytes = new Uint8Array(elevationM.buffer, elevationM.byteOffset, elevationM.byteLength);
  const lines = [width, height, west, north, cellWidth, cellHeight, crs.proj4, await sha256Hex(bytes)];
  return sha256OfText(lines.join('\n'));
}
