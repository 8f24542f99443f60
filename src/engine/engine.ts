import { OverbrimError } from '../core/index.ts';
import {
  defineProcess,
  Job,
  type JobProgress,
  type Json,
  type Lineage,
  mediaTypeOf,
  type OutputBody,
  type Process,
  type ProcessDescription,
  type Registry,
  type Software,
} from '../host/index.ts';
import { brimful, type TerrainInputs, type TerrainStore, terrainInputs } from '../processes/index.ts';
import { blobSource } from '../raster/blob-source.ts';
import type { ByteSource } from '../raster/byte-source.ts';
import type { EpsgLookup } from '../raster/epsg.ts';
import { urlSource } from '../raster/url-source.ts';
import { builtInProcesses } from './built-in.ts';
import { type SurveyView, surveyView } from './survey-view.ts';
import { TerrainShelf } from './terrain-shelf.ts';

/** An output as it crosses from the engine: its media type and its bytes. */
export interface OutputBytes {
  readonly mediaType: string;
  readonly bytes: Uint8Array;
}

/** What a run gave. */
export interface EngineResult {
  readonly outputs: Readonly<Record<string, OutputBytes>>;
  readonly lineage: Lineage;
  readonly notes: readonly string[];
}

/** An error in a form that survives the way between threads. */
export interface ToldError {
  readonly code: string;
  readonly message: string;
}

export type Answer<T> = { readonly value: T } | { readonly error: ToldError };

/** Prefix of references to files that a page lent. */
const lentPrefix = 'lent:';

/**
 * Host, processes and terrains in one place: in a worker, or on the main thread where there is none. Terrains and
 * surveys stay here under their references, so that no grid is copied for a question.
 */
export class Engine {
  readonly #registry: Registry<TerrainStore> = builtInProcesses();
  readonly #shelf: TerrainShelf;
  readonly #software: Software;
  readonly #lent = new Map<string, { name: string; blob: Blob }>();
  readonly #jobs = new Map<number, Job<TerrainStore>>();

  constructor(software: Software, epsg: EpsgLookup) {
    this.#software = software;
    this.#shelf = new TerrainShelf({ source: async (reference) => this.#source(reference), epsg });
  }

  descriptions(): ProcessDescription[] {
    return this.#registry.list().map(({ description }) => description);
  }

  /** Keeps a file of the page and gives the reference under which processes find it. */
  lend(name: string, blob: Blob): string {
    const reference = `${lentPrefix}${this.#lent.size + 1}/${name}`;
    this.#lent.set(reference, { name, blob });
    return reference;
  }

  /** Runs a process; `id` is the asker's and serves to dismiss. */
  async run(
    id: number,
    processId: string,
    inputs: Readonly<Record<string, Json>>,
    tell: (progress: JobProgress) => void,
  ): Promise<Answer<EngineResult>> {
    return this.#answer(id, async () => {
      const process = this.#registry.get(processId);
      const { outputs, lineage, notes } = await this.#ran(id, process, inputs, tell);
      const bytes: Record<string, OutputBytes> = {};
      for (const [output, description] of Object.entries(process.description.outputs)) {
        bytes[output] = { mediaType: mediaTypeOf(description), bytes: bytesOf(outputs[output]) };
      }
      return { outputs: bytes, lineage, notes };
    });
  }

  /** What a map needs to paint the brimful terrain that these inputs describe. */
  async view(
    id: number,
    inputs: Readonly<Record<string, Json>>,
    tell: (progress: JobProgress) => void,
  ): Promise<Answer<{ view: SurveyView; notes: readonly string[] }>> {
    return this.#answer(id, async () => {
      let view: SurveyView | undefined;
      const looking = viewing((made) => {
        view = made;
      });
      const { notes } = await this.#ran(id, looking, inputs, tell);
      if (view === undefined)
        throw new OverbrimError(
          'failed',
          'The survey gave no view; this is a fault of the program, please report it.',
        );
      return { view, notes };
    });
  }

  /** Stops a job at its next breath; terrains and surveys stay. */
  dismiss(id: number): void {
    this.#jobs.get(id)?.dismiss();
  }

  #ran(
    id: number,
    process: Process<TerrainStore>,
    inputs: Readonly<Record<string, Json>>,
    tell: (progress: JobProgress) => void,
  ): Job<TerrainStore>['result'] {
    const job = new Job(process, inputs, this.#shelf, { software: this.#software, onProgress: tell });
    this.#jobs.set(id, job);
    return job.result;
  }

  async #answer<T>(id: number, work: () => Promise<T>): Promise<Answer<T>> {
    try {
      return { value: await work() };
    } catch (error) {
      return { error: told(error) };
    } finally {
      this.#jobs.delete(id);
    }
  }

  #source(reference: string): ByteSource {
    if (!reference.startsWith(lentPrefix)) return urlSource(reference);
    const lent = this.#lent.get(reference);
    if (lent === undefined) {
      throw new OverbrimError(
        'unreadable',
        `The file behind ${reference} is not here any more; choose it again.`,
      );
    }
    return blobSource(lent.blob, lent.name);
  }
}

/** Fills a terrain to the brim for the eye alone; no process of the registry, since its result is not a document. */
function viewing(take: (view: SurveyView) => void): Process<TerrainStore> {
  return defineProcess({
    description: {
      id: 'survey-view',
      version: '1.0.0',
      title: 'Survey the terrain',
      description: 'Fills the terrain to the brim for painting.',
      jobControlOptions: ['async-execute', 'dismiss'],
      outputTransmission: ['value'],
      inputs: terrainInputs,
      outputs: {},
    },
    run: async (inputs: TerrainInputs, context, store: TerrainStore) => {
      take(surveyView(await brimful(inputs, context, store)));
      return {};
    },
  });
}

/** The bytes that the command line would write for the same output. */
function bytesOf(body: OutputBody): Uint8Array {
  if ('bytes' in body) return body.bytes;
  const encoder = new TextEncoder();
  if ('json' in body) return encoder.encode(`${JSON.stringify(body.json, null, 2)}\n`);
  const pieces: Uint8Array[] = [];
  let length = 0;
  for (const text of body.text) {
    const piece = encoder.encode(text);
    pieces.push(piece);
    length += piece.length;
  }
  const bytes = new Uint8Array(length);
  let at = 0;
  for (const piece of pieces) {
    bytes.set(piece, at);
    at += piece.length;
  }
  return bytes;
}

function told(error: unknown): ToldError {
  if (error instanceof OverbrimError) return { code: error.code, message: error.message };
  const what = error instanceof Error ? error.message : String(error);
  if (error instanceof RangeError && /allocation|array (buffer|length)/i.test(what)) {
    return {
      code: 'out-of-memory',
      message: `There is not enough memory for this terrain (${what}); choose a smaller extent or cell budget.`,
    };
  }
  return { code: 'failed', message: `This is a fault of the program, please report it: ${what}` };
}
