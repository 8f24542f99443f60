import { OverbrimError } from '../core/error.ts';
import { checkedInputs } from './check-inputs.ts';
import type { Json, ProcessDescription } from './description.ts';
import { type Lineage, lineageOf, type Software } from './lineage.ts';
import type { Inputs, JobContext, OutputBody, Process } from './process.ts';

export type JobStatus = 'accepted' | 'running' | 'successful' | 'failed' | 'dismissed';

/** What is told of a job while it runs; times in milliseconds. */
export interface JobProgress {
  readonly status: JobStatus;
  /** Percent of the work done, 0 to 100. */
  readonly percent: number;
  readonly doing: string;
  readonly elapsedMs: number;
  /** Estimate of the whole time, null while it is too early to tell. */
  readonly expectedMs: number | null;
}

/** What a job gave. */
export interface JobResult {
  readonly outputs: Readonly<Record<string, OutputBody>>;
  readonly lineage: Lineage;
  readonly notes: readonly string[];
}

export interface JobOptions {
  readonly software: Software;
  readonly onProgress?: (progress: JobProgress) => void;
  /** Wall clock, milliseconds since 1970. */
  readonly now?: () => number;
}

/** Time between two breaths, milliseconds: how long other work may have to wait. */
const breathMs = 40;

/** One run of a process with checked inputs, which can be watched and dismissed. */
export class Job<Resources> {
  readonly description: ProcessDescription;
  readonly inputs: Inputs;
  readonly result: Promise<JobResult>;
  readonly #abort = new AbortController();
  readonly #options: JobOptions;
  readonly #startedMs: number;
  #status: JobStatus = 'accepted';
  #done = 0;
  #doing = '';

  /** @throws OverbrimError `bad-input` when the inputs do not fit the description. */
  constructor(
    process: Process<Resources>,
    inputs: Readonly<Record<string, Json>>,
    resources: Resources,
    options: JobOptions,
  ) {
    this.description = process.description;
    this.inputs = checkedInputs(process.description, inputs);
    this.#options = options;
    this.#startedMs = this.#now();
    this.result = this.#run(process, resources);
  }

  get progress(): JobProgress {
    const elapsedMs = this.#now() - this.#startedMs;
    const expectedMs = this.#done > 0.02 ? elapsedMs / this.#done : null;
    const percent = Math.floor(100 * this.#done);
    return { status: this.#status, percent, doing: this.#doing, elapsedMs, expectedMs };
  }

  /** Stops the job at its next breath; its result is rejected with OverbrimError `cancelled`. */
  dismiss(): void {
    this.#abort.abort();
  }

  async #run(process: Process<Resources>, resources: Resources): Promise<JobResult> {
    const notes: string[] = [];
    const facts: Record<string, Json> = {};
    let lastBreath = this.#now();
    const { signal } = this.#abort;
    const context: JobContext = {
      signal,
      progress: (done, doing) => {
        this.#done = Math.min(1, Math.max(this.#done, done));
        this.#doing = doing;
        this.#tell('running');
      },
      breathe: async () => {
        if (this.#now() - lastBreath >= breathMs) {
          await new Promise((resolve) => setTimeout(resolve, 0));
          lastBreath = this.#now();
        }
        if (signal.aborted) {
          throw new OverbrimError(
            'cancelled',
            `The process ${this.description.id} was dismissed at ${Math.floor(100 * this.#done)} %; start it again when wanted.`,
          );
        }
      },
      note: (sentence) => notes.push(sentence),
      record: (name, fact) => {
        facts[name] = fact;
      },
    };
    // The caller gets the job before it starts, so that nothing is told too early.
    await Promise.resolve();
    try {
      this.#tell('running');
      const outputs = await process.run(this.inputs, context, resources);
      checkOutputs(this.description, outputs);
      this.#done = 1;
      this.#tell('successful');
      const times = { startedMs: this.#startedMs, finishedMs: this.#now() };
      const { description, inputs } = this;
      const lineage = lineageOf(description, inputs, facts, notes, this.#options.software, times);
      return { outputs, lineage, notes };
    } catch (error) {
      this.#tell(signal.aborted ? 'dismissed' : 'failed');
      throw error;
    }
  }

  #tell(status: JobStatus): void {
    this.#status = status;
    this.#options.onProgress?.(this.progress);
  }

  #now(): number {
    return (this.#options.now ?? Date.now)();
  }
}

function checkOutputs(description: ProcessDescription, outputs: Readonly<Record<string, OutputBody>>): void {
  const expected = Object.keys(description.outputs);
  const given = Object.keys(outputs);
  if (expected.length !== given.length || expected.some((id) => outputs[id] === undefined)) {
    throw new OverbrimError(
      'failed',
      `The process ${description.id} gave the outputs ${given.join(', ')}; its description promises ${expected.join(', ')}, so one of the two must be mended.`,
    );
  }
}
