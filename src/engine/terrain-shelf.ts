import { type Neighbours, OverbrimError, type Survey, surveySteps } from '../core/index.ts';
import type { JobContext } from '../host/index.ts';
import type { TerrainRequest, TerrainStore, TextFile } from '../processes/index.ts';
import type { ByteSource } from '../raster/byte-source.ts';
import { crsFromEpsg } from '../raster/crs.ts';
import type { EpsgLookup } from '../raster/epsg.ts';
import { sha256Hex } from '../raster/hash.ts';
import { openTerrain } from '../raster/open-terrain.ts';
import type { Crs, Terrain } from '../raster/terrain.ts';

/** How the place of running reaches files. */
export interface Reach {
  /** The bytes behind a path or URL. */
  source(reference: string): Promise<ByteSource>;
  readonly epsg?: EpsgLookup;
}

/** Shares of a job's work: reading takes the first, surveying the second. */
const readingShare = 0.3;
const surveyShare = 0.5;
/** Text inputs are outlines and points; what is larger is some other file. */
const mostTextBytes = 256 * 2 ** 20;
/** Terrains kept: the one at hand, and the one before in case the page goes back to it. */
const mostTerrains = 2;

/** Keeps the latest terrains and their surveys, so that a second question reads and surveys nothing again. */
export class TerrainShelf implements TerrainStore {
  readonly #reach: Reach;
  readonly #terrains = new Map<string, Terrain>();
  readonly #made = new WeakMap<Terrain, { key: string; value: unknown }>();
  readonly #surveys = new WeakMap<Terrain, Map<string, Survey>>();

  constructor(reach: Reach) {
    this.#reach = reach;
  }

  async terrain(request: TerrainRequest, context: JobContext): Promise<Terrain> {
    const { references, ...extract } = request;
    const key = JSON.stringify(request);
    const held = this.#terrains.get(key);
    if (held !== undefined) {
      this.#keep(key, held);
      return held;
    }
    context.progress(0, 'reading elevation');
    const sources = await this.#sources(references);
    const terrain = await openTerrain(sources, {
      ...extract,
      ...(this.#reach.epsg === undefined ? {} : { epsg: this.#reach.epsg }),
      signal: context.signal,
      progress: (done) => context.progress(readingShare * done, 'reading elevation'),
    });
    this.#keep(key, terrain);
    return terrain;
  }

  /** Puts a terrain last, and lets go of those that were longest without a question. */
  #keep(key: string, terrain: Terrain): void {
    this.#terrains.delete(key);
    this.#terrains.set(key, terrain);
    for (const oldest of this.#terrains.keys()) {
      if (this.#terrains.size <= mostTerrains) break;
      this.#terrains.delete(oldest);
    }
  }

  /** Opens all, or closes again what is open. */
  async #sources(references: readonly string[]): Promise<ByteSource[]> {
    const sources: ByteSource[] = [];
    try {
      for (const reference of references) sources.push(await this.#reach.source(reference));
      return sources;
    } catch (error) {
      for (const source of sources) await source.close?.();
      throw error;
    }
  }

  async survey(
    terrain: Terrain,
    neighbours: Neighbours,
    madePits: Float64Array,
    context: JobContext,
  ): Promise<Survey> {
    const held = this.#surveys.get(terrain) ?? new Map<string, Survey>();
    this.#surveys.set(terrain, held);
    const key = `${neighbours} ${madePits.join()}`;
    const known = held.get(key);
    if (known !== undefined) return known;
    const steps = surveySteps(terrain.grid, { neighbours, madePits });
    for (;;) {
      const step = steps.next();
      if (step.done) {
        held.set(key, step.value);
        return step.value;
      }
      context.progress(readingShare + surveyShare * step.value, 'surveying catchments');
      await context.breathe();
    }
  }

  async kept<T>(terrain: Terrain, key: string, make: () => Promise<T>): Promise<T> {
    const held = this.#made.get(terrain);
    if (held?.key === key) return held.value as T;
    const value = await make();
    this.#made.set(terrain, { key, value });
    return value;
  }

  crs(code: number): Promise<Crs> {
    return crsFromEpsg(code, this.#reach.epsg);
  }

  async text(reference: string): Promise<TextFile> {
    const source = await this.#reach.source(reference);
    try {
      // A source of unknown size tells it with its first answer.
      await source.read(0, 1);
      const size = source.size ?? 0;
      if (size > mostTextBytes) {
        throw new OverbrimError(
          'too-large',
          `${source.name} has ${size} bytes; expected a GeoJSON file of at most ${mostTextBytes}, so cut it to the terrain.`,
        );
      }
      const bytes = await source.read(0, size);
      return { name: source.name, text: new TextDecoder().decode(bytes), sha256: await sha256Hex(bytes) };
    } finally {
      await source.close?.();
    }
  }
}
