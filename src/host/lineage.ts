import type { Json, ProcessDescription } from './description.ts';
import type { Inputs } from './process.ts';

/** The program that did the work. */
export interface Software {
  readonly name: string;
  readonly version: string;
}

/** Where a result comes from: the same lineage run again gives the same outputs. */
export interface Lineage {
  readonly process: { readonly id: string; readonly version: string };
  readonly software: Software;
  readonly inputs: Inputs;
  /**
   * What the process recorded: hash and place of the elevation, settings that it derived; under `textFiles` name and
   * SHA-256 of each text file among the inputs, such as outlets, since a path does not tell what it held.
   */
  readonly facts: Readonly<Record<string, Json>>;
  readonly notes: readonly string[];
  /** ISO 8601, UTC. */
  readonly started: string;
  readonly finished: string;
}

export function lineageOf(
  description: ProcessDescription,
  inputs: Inputs,
  facts: Readonly<Record<string, Json>>,
  notes: readonly string[],
  software: Software,
  times: { startedMs: number; finishedMs: number },
): Lineage {
  return {
    process: { id: description.id, version: description.version },
    software,
    inputs,
    facts,
    notes,
    started: new Date(times.startedMs).toISOString(),
    finished: new Date(times.finishedMs).toISOString(),
  };
}
