import { proxy, type Remote, wrap } from 'comlink';
import { OverbrimError } from '../core/error.ts';
import { type JobProgress, software } from '../host/index.ts';
import type { EngineEntry } from './engine-entry.ts';
import { entryOnMainThread } from './entry-name.ts';

export type EnginePlace = 'worker' | 'inline worker' | 'main thread';

/** An engine that answers. */
export interface Started {
  readonly place: EnginePlace;
  readonly entry: Remote<EngineEntry>;
  /** Makes a function callable from where the engine runs. */
  across(tell: (progress: JobProgress) => void): (progress: JobProgress) => void;
  end(): void;
}

/** The worker's file and the register of CRS codes lie beside the script. */
const besideWorker = new URL('../overbrim-worker.js', import.meta.url).href;
const besideEpsg = new URL('../overbrim-epsg.json', import.meta.url).href;

/** What the worker loads when a file needs it. Named here in full, so that bundlers bring these files along. */
const besideParts = {
  'overbrim-zstd.js': new URL('../overbrim-zstd.js', import.meta.url).href,
  'overbrim-user-defined-crs.js': new URL('../overbrim-user-defined-crs.js', import.meta.url).href,
};

/** How long a worker may take to say that it is there, milliseconds. */
const patienceMs = 20_000;

/**
 * Starts the engine in the first place that works: a worker from the given file, from the file beside the script, a
 * worker inside a blob (for scripts of another origin), the main thread, where work is done in slices. Each step
 * back is told in a sentence.
 * @throws OverbrimError `failed` when it runs nowhere.
 */
export async function startEngine(
  workerUrl: string | undefined,
  onStepBack: (sentence: string) => void = () => {},
): Promise<Started> {
  const files = workerUrl === undefined ? [besideWorker] : [absolute(workerUrl), besideWorker];
  const places: { name: string; start: () => Promise<Started> }[] = [
    ...files.map((url) => ({ name: `a worker from ${url}`, start: () => inWorker(url, 'worker') })),
    { name: 'a worker inside a blob', start: () => inBlob(files[0]) },
    { name: 'the main thread', start: () => onMainThread(files) },
  ];
  const reasons: string[] = [];
  for (const [i, { name, start }] of places.entries()) {
    try {
      return await start();
    } catch (error) {
      const why = error instanceof Error ? error.message : String(error);
      reasons.push(`${name}: ${why}`);
      const next = places[i + 1];
      if (next !== undefined)
        onStepBack(`The analysis cannot run in ${name} (${why}); ${next.name} is tried instead.`);
    }
  }
  throw new OverbrimError(
    'failed',
    `The analysis could not be started (${reasons.join('; ')}); serve overbrim-worker.js beside the script, or name its address with worker-url.`,
  );
}

async function inWorker(url: string, place: EnginePlace): Promise<Started> {
  const worker = new Worker(url);
  const entry = wrap<EngineEntry>(worker);
  const failed = new Promise<never>((_, reject) => {
    worker.addEventListener('error', (event) => {
      event.preventDefault();
      reject(new Error(event.message || 'the file could not be loaded as a worker'));
    });
    setTimeout(() => reject(new Error(`no answer within ${patienceMs / 1000} s`)), patienceMs);
  });
  try {
    await Promise.race([entry.open(software, besideEpsg, besideParts), failed]);
  } catch (error) {
    worker.terminate();
    throw error;
  }
  return { place, entry, across: (tell) => proxy(tell), end: () => worker.terminate() };
}

/** A worker of the page's own origin that loads the file of another. */
async function inBlob(url: string): Promise<Started> {
  const script = new Blob([`importScripts(${JSON.stringify(url)});`], { type: 'text/javascript' });
  const address = URL.createObjectURL(script);
  try {
    return await inWorker(address, 'inline worker');
  } finally {
    URL.revokeObjectURL(address);
  }
}

async function onMainThread(files: readonly string[]): Promise<Started> {
  let loaded: unknown = new Error('no file');
  for (const url of files) {
    loaded = await scriptLoaded(url).catch((error: unknown) => error);
    if (loaded === undefined) break;
  }
  if (loaded instanceof Error) throw loaded;
  const make: (() => EngineEntry) | undefined = Reflect.get(globalThis, entryOnMainThread);
  if (make === undefined) throw new Error('the file gave no engine');
  const direct = make();
  direct.open(software, besideEpsg, besideParts);
  // Called straight, with the same promises as across threads.
  const entry = new Proxy(direct, {
    get:
      (target, name: keyof EngineEntry) =>
      async (...given: never[]) =>
        Reflect.apply(target[name], target, given),
  }) as unknown as Remote<EngineEntry>;
  return { place: 'main thread', entry, across: (tell) => tell, end: () => {} };
}

function scriptLoaded(url: string): Promise<undefined> {
  return new Promise((resolve, reject) => {
    const script = document.createElement('script');
    script.src = url;
    script.onload = () => resolve(undefined);
    script.onerror = () => reject(new Error(`${url} could not be loaded`));
    document.head.append(script);
  });
}

function absolute(url: string): string {
  return new URL(url, document.baseURI).href;
}
