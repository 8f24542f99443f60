import { type ErrorCode, OverbrimError } from '../core/error.ts';
import {
  type JobProgress,
  JobQueue,
  type Json,
  type ProcessDescription,
  type QueuedJob,
} from '../host/index.ts';
import type { Answer, EngineResult } from './engine.ts';
import { type EnginePlace, type Started, startEngine } from './places.ts';
import type { SurveyView } from './survey-view.ts';

export interface EngineOptions {
  /** The worker's file, where it does not lie beside the script. */
  readonly workerUrl?: string;
  /** Jobs that run at a time. */
  readonly limit?: number;
  /** Told, once, a sentence for each place where the engine could not run. */
  readonly onStepBack?: (sentence: string) => void;
}

export interface ViewResult {
  readonly view: SurveyView;
  readonly notes: readonly string[];
}

type Inputs = Readonly<Record<string, Json>>;
type Tell = (progress: JobProgress) => void;

/** The engine as a page sees it, in a worker or not. */
export class EngineClient {
  readonly place: EnginePlace;
  readonly #started: Started;
  readonly #queue: JobQueue;
  #lastId = 0;

  constructor(started: Started, limit?: number) {
    this.place = started.place;
    this.#started = started;
    this.#queue = new JobQueue(limit);
  }

  descriptions(): Promise<ProcessDescription[]> {
    return this.#started.entry.descriptions();
  }

  /** Hands over a file; the reference serves as terrain in inputs. */
  lend(name: string, blob: Blob): Promise<string> {
    return this.#started.entry.lend(name, blob);
  }

  /** Runs a process by its id. */
  run(processId: string, inputs: Inputs, onProgress?: Tell): QueuedJob<EngineResult> {
    const { entry } = this.#started;
    return this.#job(processId, (id, tell) => entry.run(id, processId, inputs, tell), onProgress);
  }

  /** Surveys the terrain of the inputs for painting. */
  view(inputs: Inputs, onProgress?: Tell): QueuedJob<ViewResult> {
    const { entry } = this.#started;
    return this.#job('the survey', (id, tell) => entry.view(id, inputs, tell), onProgress);
  }

  /** Ends the engine with all that it holds. */
  close(): void {
    this.#started.end();
  }

  #job<T>(
    title: string,
    ask: (id: number, tell: Tell) => Promise<Answer<T>>,
    onProgress?: Tell,
  ): QueuedJob<T> {
    return this.#queue.add(
      title,
      async (signal, tell) => {
        const id = ++this.#lastId;
        signal.addEventListener('abort', () => this.#started.entry.dismiss(id));
        const answer = await ask(id, this.#started.across(tell));
        if ('value' in answer) return answer.value;
        throw new OverbrimError(answer.error.code as ErrorCode, answer.error.message);
      },
      onProgress,
    );
  }
}

/** Starts the engine in the first place that works: see places.ts. */
export async function openEngine(options: EngineOptions = {}): Promise<EngineClient> {
  return new EngineClient(await startEngine(options.workerUrl, options.onStepBack), options.limit);
}

export type { EnginePlace, EngineResult, SurveyView };
