import { OverbrimError } from '../core/error.ts';
import type { JobProgress, JobStatus } from './job.ts';

/** A job as its asker holds it, wherever it runs. */
export interface QueuedJob<Result> {
  readonly id: number;
  readonly title: string;
  readonly progress: JobProgress;
  /** Rejected with OverbrimError `cancelled` at the moment of dismissal. */
  readonly result: Promise<Result>;
  /** Answers at once: the result is rejected now, and the work stops at its next breath. */
  dismiss(): void;
}

/** Starts the work of a job and tells how far it is; ends it when the signal says so. */
export type Work<Result> = (signal: AbortSignal, tell: (progress: JobProgress) => void) => Promise<Result>;

/** Lets a limited number of jobs run at a time; the others wait in the order in which they came. */
export class JobQueue {
  readonly #limit: number;
  readonly #waiting: (() => void)[] = [];
  #running = 0;
  #lastId = 0;

  constructor(limit = 2) {
    this.#limit = limit;
  }

  add<Result>(
    title: string,
    work: Work<Result>,
    onProgress?: (progress: JobProgress) => void,
  ): QueuedJob<Result> {
    const startedMs = Date.now();
    const abort = new AbortController();
    let progress: JobProgress = { status: 'accepted', percent: 0, doing: '', elapsedMs: 0, expectedMs: null };
    const tell = (news: JobProgress): void => {
      if (isOver(progress.status)) return;
      progress = news;
      onProgress?.(progress);
    };
    const finish = (status: JobStatus): void =>
      tell({ ...progress, status, elapsedMs: Date.now() - startedMs, expectedMs: null });
    const run = async (): Promise<Result> => {
      this.#running++;
      try {
        // What the work tells after its end or dismissal is no news any more.
        return await work(abort.signal, (news) => {
          if (news.status === 'running') tell({ ...news, elapsedMs: Date.now() - startedMs });
        });
      } finally {
        this.#running--;
        this.#waiting.shift()?.();
      }
    };
    const result = new Promise<Result>((resolve, reject) => {
      abort.signal.addEventListener('abort', () => {
        finish('dismissed');
        reject(new OverbrimError('cancelled', `${title} was dismissed; start it again when wanted.`));
      });
      const start = (): void => {
        if (abort.signal.aborted) {
          this.#waiting.shift()?.();
          return;
        }
        run().then(
          (value) => {
            finish('successful');
            resolve(value);
          },
          (error) => {
            finish('failed');
            reject(error);
          },
        );
      };
      if (this.#running < this.#limit) start();
      else this.#waiting.push(start);
    });
    return {
      id: ++this.#lastId,
      title,
      get progress() {
        return progress;
      },
      result,
      dismiss: () => abort.abort(),
    };
  }
}

function isOver(status: JobStatus): boolean {
  return status === 'successful' || status === 'failed' || status === 'dismissed';
}
