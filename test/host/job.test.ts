import { setTimeout as later } from 'node:timers/promises';
import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/index.ts';
import { Job, type JobProgress } from '../../src/host/index.ts';
import { sampleProcess } from './sample-process.ts';

const software = { name: 'test', version: '9' };
const answer = { answer: { json: 42 } };

function jobOf(run: Parameters<typeof sampleProcess>[0], now?: () => number) {
  const told: JobProgress[] = [];
  const job = new Job(sampleProcess(run), { places: 'here' }, null, {
    software,
    onProgress: (progress) => told.push(progress),
    ...(now === undefined ? {} : { now }),
  });
  return { job, told };
}

/** Keeps the thread busy. */
function toil(ms: number): void {
  const end = performance.now() + ms;
  while (performance.now() < end);
}

describe('Job', () => {
  it('is accepted at first and tells every status once it runs', async () => {
    const { job, told } = jobOf(async () => answer);
    expect(job.progress).toMatchObject({ status: 'accepted', percent: 0 });
    expect((await job.result).outputs).toEqual(answer);
    expect(told.map(({ status }) => status)).toEqual(['running', 'successful']);
    expect(job.progress).toMatchObject({ status: 'successful', percent: 100 });
  });

  it('never lets progress run backwards or past the end', async () => {
    const { job, told } = jobOf(async (context) => {
      for (const done of [0.2, 0.6, 0.4, -1, 0.7, 3]) context.progress(done, 'working');
      return answer;
    });
    await job.result;
    expect(told.map(({ percent }) => percent)).toEqual([0, 20, 60, 60, 60, 70, 100, 100]);
  });

  it('estimates the whole time from the share done', async () => {
    let now = 1000;
    const { job, told } = jobOf(
      async (context) => {
        now += 100;
        context.progress(0.01, 'early');
        now += 100;
        context.progress(0.25, 'late');
        return answer;
      },
      () => now,
    );
    await job.result;
    expect(told[1]).toMatchObject({ elapsedMs: 100, expectedMs: null });
    expect(told[2]).toMatchObject({ elapsedMs: 200, expectedMs: 800 });
  });

  it('lets timers run when it breathes', async () => {
    let ticks = 0;
    const timer = setInterval(() => ticks++, 5);
    const { job } = jobOf(async (context) => {
      for (let i = 0; i < 6; i++) {
        toil(50);
        await context.breathe();
      }
      return answer;
    });
    await job.result;
    clearInterval(timer);
    expect(ticks).toBeGreaterThanOrEqual(3);
  });

  it('stops at the breath in which it is dismissed, a breath being due every 40 ms', async () => {
    let steps = 0;
    const { job, told } = jobOf(async (context) => {
      for (; steps < 1000; steps++) {
        toil(10);
        context.progress(steps / 1000, 'working');
        await context.breathe();
      }
      return answer;
    });
    const ended = job.result.catch((error: unknown) => error);
    await later(60);
    const stepsThen = steps;
    job.dismiss();
    const error = await ended;
    expect(steps).toBe(stepsThen);
    expect(error).toBeInstanceOf(OverbrimError);
    expect(error).toMatchObject({ code: 'cancelled' });
    expect(String(error)).toMatch(/The process sample was dismissed at \d+ %; start it again when wanted\./);
    expect(told.at(-1)?.status).toBe('dismissed');
  });

  it('is dismissed as soon as its process looks at the signal', async () => {
    const { job } = jobOf(
      (context) =>
        new Promise((_, reject) => {
          context.signal.addEventListener('abort', () => reject(new OverbrimError('cancelled', 'Stopped.')));
        }),
    );
    await later(5);
    job.dismiss();
    await expect(job.result).rejects.toThrow('Stopped.');
    expect(job.progress.status).toBe('dismissed');
  });

  it('hands on what a process throws', async () => {
    const wrong = new OverbrimError('no-outlet', 'A sentence.');
    const { job, told } = jobOf(async () => {
      throw wrong;
    });
    await expect(job.result).rejects.toBe(wrong);
    expect(told.at(-1)?.status).toBe('failed');
  });

  it('refuses outputs that the description does not promise', async () => {
    for (const outputs of [{}, { other: { json: 1 } }, { ...answer, other: { json: 1 } }]) {
      const { job } = jobOf(async () => outputs);
      await expect(job.result).rejects.toThrow(
        `The process sample gave the outputs ${Object.keys(outputs).join(', ')}; its description promises answer, so one of the two must be mended.`,
      );
      expect(job.progress.status).toBe('failed');
    }
  });

  it('refuses inputs before it is a job', () => {
    expect(
      () =>
        new Job(
          sampleProcess(async () => answer),
          { places: 'a', depth: 'b' },
          null,
          { software },
        ),
    ).toThrow('The input "depth" is "b"');
  });

  it('gives a lineage with all that the result came from', async () => {
    let now = Date.UTC(2021, 5, 4, 3, 2, 1);
    const { job } = jobOf(
      async (context) => {
        context.record('terrain', { sha256: 'abc' });
        context.note('Mind the gap.');
        now += 1500;
        return answer;
      },
      () => now,
    );
    const { lineage, notes } = await job.result;
    expect(lineage).toEqual({
      process: { id: 'sample', version: '1.2.3' },
      software,
      inputs: { places: ['here'], depth: 2 },
      facts: { terrain: { sha256: 'abc' } },
      notes: ['Mind the gap.'],
      started: '2021-06-04T03:02:01.000Z',
      finished: '2021-06-04T03:02:02.500Z',
    });
    expect(notes).toEqual(['Mind the gap.']);
  });
});
