import type { Neighbours, Survey } from '../core/index.ts';
import type { JobContext } from '../host/index.ts';
import type { Crs, Terrain } from '../raster/terrain.ts';
import type { TerrainRequest } from './terrain-request.ts';

/** A text file as it was read. */
export interface TextFile {
  readonly name: string;
  readonly text: string;
  /** Of its bytes, in hex. */
  readonly sha256: string;
}

/**
 * What the built-in processes borrow from the place where they run: terrains and their surveys, kept under handles
 * so that no file is read and no terrain surveyed twice.
 */
export interface TerrainStore {
  /** The terrain behind one reference (path or URL), or the mosaic of several. */
  terrain(request: TerrainRequest, context: JobContext): Promise<Terrain>;
  /** Its survey; `madePits` are row-major cells, ascending. */
  survey(
    terrain: Terrain,
    neighbours: Neighbours,
    madePits: Float64Array,
    context: JobContext,
  ): Promise<Survey>;
  /** What was made last for this terrain under this key, or what `make` makes; so that a second question is quick. */
  kept<T>(terrain: Terrain, key: string, make: () => Promise<T>): Promise<T>;
  /** A CRS by its EPSG code. */
  crs(code: number): Promise<Crs>;
  /** A small text file behind a reference, such as outlets as GeoJSON. */
  text(reference: string): Promise<TextFile>;
}
