import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { type Engine, Running } from '../../src/elements/running.ts';
import { type JobProgress, JobQueue, type QueuedJob } from '../../src/host/index.ts';

/** Work that never ends by itself. */
function endless(): QueuedJob<string> {
  return new JobQueue().add('endless work', () => new Promise<string>(() => {}));
}

function done(value: string): QueuedJob<string> {
  return new JobQueue().add('short work', async () => value);
}

const engine = {} as Engine;
const codeOf = (asked: Promise<unknown>): Promise<unknown> =>
  asked.then(
    () => 'answered',
    (error: unknown) => (error instanceof OverbrimError ? error.code : error),
  );

describe('Running', () => {
  it('answers a question and is idle again', async () => {
    const running = new Running(async () => engine);
    await expect(running.ask('ponds', () => done('three'))).resolves.toBe('three');
    await new Promise((next) => setTimeout(next));
    expect(running.jobs).toEqual([]);
  });

  it('ends a question at the moment of its dismissal, also while the engine still opens', async () => {
    const running = new Running(() => new Promise<Engine>(() => {}));
    const asked = codeOf(running.ask('terrain', endless));
    running.dismiss('terrain');
    expect(running.jobs).toEqual([]);
    expect(await asked).toBe('cancelled');
  });

  it('dismisses the work itself', async () => {
    const running = new Running(async () => engine);
    let status = '';
    const asked = codeOf(
      running.ask('terrain', () => {
        const work = endless();
        work.result.catch(() => {
          status = work.progress.status;
        });
        return work;
      }),
    );
    await new Promise((next) => setTimeout(next));
    running.dismiss('terrain');
    expect(await asked).toBe('cancelled');
    expect(status).toBe('dismissed');
  });

  it('lets a newer question of the same kind take the place of the old', async () => {
    const running = new Running(async () => engine);
    const old = codeOf(running.ask('ponds', endless));
    const other = codeOf(running.ask('path', endless));
    const asked = running.ask('ponds', () => done('new'));
    expect(running.jobs.map(({ kind }) => kind).sort()).toEqual(['path', 'ponds']);
    expect(await old).toBe('cancelled');
    await expect(asked).resolves.toBe('new');
    running.dismiss('path');
    expect(await other).toBe('cancelled');
  });

  it('tells the progress of what runs, and nothing of what was dismissed', async () => {
    const running = new Running(async () => engine);
    let tell: ((progress: JobProgress) => void) | undefined;
    const asked = codeOf(
      running.ask('terrain', (_engine, told) => {
        tell = told;
        return endless();
      }),
    );
    await new Promise((next) => setTimeout(next));
    const progress = {
      status: 'running',
      percent: 40,
      doing: 'reading elevation',
      elapsedMs: 4,
      expectedMs: 10,
    } as const;
    tell?.(progress);
    expect(running.jobs[0].progress).toEqual(progress);
    running.dismiss('terrain');
    tell?.(progress);
    expect(running.jobs).toEqual([]);
    expect(await asked).toBe('cancelled');
  });

  it('opens the engine once, and again after it failed to open', async () => {
    let opened = 0;
    const running = new Running(async () => {
      opened++;
      if (opened === 1) throw new OverbrimError('failed', 'No worker.');
      return engine;
    });
    expect(await codeOf(running.ask('ponds', () => done('x')))).toBe('failed');
    expect(await codeOf(running.ask('ponds', () => done('x')))).toBe('answered');
    expect(await codeOf(running.ask('path', () => done('x')))).toBe('answered');
    expect(opened).toBe(2);
  });
});
