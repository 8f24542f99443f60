import { OverbrimError } from '../core/error.ts';
import type { EngineClient, SurveyView } from '../engine/client.ts';
import type { JobProgress, QueuedJob } from '../host/index.ts';

/** What is asked of an engine: its client, or another object that answers alike. */
export type Engine = Pick<EngineClient, 'lend' | 'run' | 'view'>;

export type { SurveyView };

/** What is asked; a new question of one kind takes the place of the old. */
export type QuestionKind = 'terrain' | 'ponds' | 'path';

/** A question that runs. */
export interface RunningJob {
  readonly kind: QuestionKind;
  readonly startedMs: number;
  readonly progress: JobProgress | null;
  dismiss(): void;
}

type Tell = (progress: JobProgress) => void;

/** Questions that run, one of a kind. Tells `change` when one starts, comes on or ends. */
export class Running extends EventTarget {
  readonly #openEngine: () => Promise<Engine>;
  #engine: Promise<Engine> | undefined;
  readonly #jobs = new Map<QuestionKind, RunningJob>();

  constructor(openEngine: () => Promise<Engine>) {
    super();
    this.#openEngine = openEngine;
  }

  get jobs(): readonly RunningJob[] {
    return [...this.#jobs.values()];
  }

  /** The engine, opened at the first call and again after a failure. */
  engine(): Promise<Engine> {
    this.#engine ??= this.#openEngine().catch((error: unknown) => {
      this.#engine = undefined;
      throw error;
    });
    return this.#engine;
  }

  /** Dismisses all questions and lets go of the engine; the next question opens it anew. */
  leave(): void {
    this.dismiss('terrain', 'ponds', 'path');
    this.#engine = undefined;
  }

  dismiss(...kinds: QuestionKind[]): void {
    for (const kind of kinds) this.#jobs.get(kind)?.dismiss();
  }

  /**
   * Asks the engine and gives its answer; a question of the same kind that still runs is dismissed.
   * @throws OverbrimError `cancelled` at once when dismissed.
   */
  ask<T>(kind: QuestionKind, start: (engine: Engine, tell: Tell) => QueuedJob<T>): Promise<T> {
    const replaced = this.#jobs.get(kind);
    return new Promise<T>((resolve, reject) => {
      let queued: QueuedJob<T> | undefined;
      const end = (): void => {
        if (this.#jobs.get(kind) !== current) return;
        this.#jobs.delete(kind);
        this.#told();
      };
      let current: RunningJob = {
        kind,
        startedMs: Date.now(),
        progress: null,
        dismiss: () => {
          queued?.dismiss();
          end();
          reject(new OverbrimError('cancelled', 'The question was dismissed; ask it again when wanted.'));
        },
      };
      const tell: Tell = (progress) => {
        if (this.#jobs.get(kind) !== current) return;
        current = { ...current, progress };
        this.#jobs.set(kind, current);
        this.#told();
      };
      this.#jobs.set(kind, current);
      replaced?.dismiss();
      this.#told();
      this.engine()
        .then((engine) => {
          if (this.#jobs.get(kind) !== current) return undefined;
          queued = start(engine, tell);
          return queued.result.then(resolve);
        })
        .catch(reject)
        .finally(end);
    });
  }

  #told(): void {
    this.dispatchEvent(new Event('change'));
  }
}
