import type { Json, ProcessDescription } from './description.ts';

/**
 * An output as a process gives it: a JSON value, bytes, or text in pieces, made when they are asked for, so that
 * large results need not stand in memory.
 */
export type OutputBody =
  | { readonly json: Json }
  | { readonly bytes: Uint8Array }
  | { readonly text: Iterable<string> };

/** What a process may ask of the job that it runs in. */
export interface JobContext {
  readonly signal: AbortSignal;
  /** Work done so far, 0 to 1, and what is being done. */
  progress(done: number, doing: string): void;
  /** Lets other work run and throws OverbrimError `cancelled` when the job was dismissed; call it a few times a second. */
  breathe(): Promise<void>;
  /** A sentence that the user should read beside the result. */
  note(sentence: string): void;
  /** Facts that belong into the lineage, such as the hash of a terrain. */
  record(name: string, fact: Json): void;
}

/** Inputs after checking: defaults filled in, lists as arrays. */
export type Inputs = Readonly<Record<string, Json>>;

/**
 * An analysis: its description and the function that does it. `Resources` is what the place of running lends to
 * processes beside their inputs (terrains and surveys under handles, say); the host passes it on unseen.
 */
export interface Process<Resources = unknown> {
  readonly description: ProcessDescription;
  /** @returns an output for each id of the description. @throws OverbrimError with one sentence. */
  run(
    inputs: Inputs,
    context: JobContext,
    resources: Resources,
  ): Promise<Readonly<Record<string, OutputBody>>>;
}
