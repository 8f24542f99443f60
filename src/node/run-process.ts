import { OverbrimError } from '../core/index.ts';
import type { TerrainShelf } from '../engine/index.ts';
import {
  Job,
  type Json,
  mediaTypeOf,
  type OutputDescription,
  type Process,
  software,
} from '../host/index.ts';
import { caution, type TerrainStore } from '../processes/index.ts';
import { progressDisplay, silent } from './progress.ts';
import { ResultFolder, resultFile, type WrittenFile } from './result-folder.ts';
import type { Terminal } from './terminal.ts';

/** What a run left behind. */
export interface RunReport {
  readonly folder: string;
  readonly files: readonly WrittenFile[];
  readonly notes: readonly string[];
  /** The outputs that are small JSON values, by id. */
  readonly values: Readonly<Record<string, Json>>;
}

const extensions: Readonly<Record<string, string>> = {
  'application/geo+json': 'geojson',
  'application/json': 'json',
  'image/tiff': 'tif',
};

/**
 * Runs a process and writes its outputs and `result.json` into a folder. Ctrl-C dismisses the job; nothing
 * half-written stays. @throws OverbrimError `cancelled` then, and whatever the process throws.
 */
export async function runProcess(
  process: Process<TerrainStore>,
  inputs: Readonly<Record<string, Json>>,
  out: string,
  shelf: TerrainShelf,
  terminal: Terminal,
  options: { quiet: boolean },
): Promise<RunReport> {
  const { description } = process;
  const fileNames = Object.entries(description.outputs).map(([id, output]) => fileName(id, output));
  const folder = new ResultFolder(out, description.id, fileNames);
  const display = options.quiet ? silent : progressDisplay(terminal);
  let interrupted = 0;
  let job: Job<TerrainStore> | undefined;
  const interrupt = (): void => {
    interrupted++;
    job?.dismiss();
    if (interrupted > 1) {
      folder.discard();
      globalThis.process.exit(130);
    }
  };
  terminal.on('SIGINT', interrupt);
  terminal.on('SIGTERM', interrupt);
  try {
    folder.begin();
    job = new Job(process, inputs, shelf, { software, onProgress: (progress) => display.show(progress) });
    const { outputs, lineage, notes } = await job.result;
    const stop = (): void => {
      if (interrupted > 0)
        throw new OverbrimError(
          'cancelled',
          `The process ${description.id} was dismissed while its results were written; start it again when wanted.`,
        );
    };
    const files: (WrittenFile & { output: string; mediaType: string })[] = [];
    const values: Record<string, Json> = {};
    for (const [id, output] of Object.entries(description.outputs)) {
      const mediaType = mediaTypeOf(output);
      files.push({ output: id, mediaType, ...(await folder.write(fileName(id, output), outputs[id], stop)) });
      const body = outputs[id];
      if ('json' in body) values[id] = body.json;
      await new Promise((resolve) => setImmediate(resolve));
    }
    const result = { ...lineage, caution, outputs: files.map((written) => ({ ...written })) };
    await folder.write(resultFile, { json: result as unknown as Json }, stop);
    stop();
    folder.finish();
    return { folder: folder.path, files, notes, values };
  } catch (error) {
    folder.discard();
    throw error;
  } finally {
    display.end();
    terminal.off('SIGINT', interrupt);
    terminal.off('SIGTERM', interrupt);
  }
}

function fileName(id: string, output: OutputDescription): string {
  return `${id}.${extensions[mediaTypeOf(output).split(';')[0]] ?? 'bin'}`;
}
