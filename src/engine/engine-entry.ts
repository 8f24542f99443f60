import { transfer } from 'comlink';
import type { JobProgress, Json, Software } from '../host/index.ts';
import { Engine } from './engine.ts';
import { fetchedEpsg } from './fetched-epsg.ts';

/** What the client asks of the engine across threads. Large arrays are transferred, not copied. */
export function engineEntry() {
  let engine: Engine | undefined;
  const ready = (): Engine => {
    if (engine === undefined) throw new Error('the engine was asked before it was opened');
    return engine;
  };
  return {
    open(software: Software, epsgUrl: string, partUrls: Readonly<Record<string, string>>): void {
      // Read by the loader of parts that the build puts into the worker's file.
      Object.assign(globalThis, { overbrimPartAddresses: partUrls });
      engine = new Engine(software, fetchedEpsg(epsgUrl));
    },
    descriptions: () => ready().descriptions(),
    lend: (name: string, blob: Blob) => ready().lend(name, blob),
    dismiss: (id: number) => ready().dismiss(id),
    async run(
      id: number,
      processId: string,
      inputs: Readonly<Record<string, Json>>,
      tell: (progress: JobProgress) => void,
    ) {
      const answer = await ready().run(id, processId, inputs, tell);
      const buffers =
        'value' in answer ? Object.values(answer.value.outputs).map(({ bytes }) => bytes.buffer) : [];
      return transfer(answer, buffers);
    },
    async view(id: number, inputs: Readonly<Record<string, Json>>, tell: (progress: JobProgress) => void) {
      const answer = await ready().view(id, inputs, tell);
      if (!('value' in answer)) return answer;
      const { elevationM, leaf, levelM, pondOfLeaf } = answer.value.view;
      return transfer(answer, [elevationM.buffer, leaf.buffer, levelM.buffer, pondOfLeaf.buffer]);
    },
  };
}

export type EngineEntry = ReturnType<typeof engineEntry>;
