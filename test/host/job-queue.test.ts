import { describe, expect, it } from 'vitest';
import { type JobProgress, JobQueue } from '../../src/host/index.ts';

const running = (percent: number): JobProgress => ({
  status: 'running',
  percent,
  doing: 'working',
  elapsedMs: 0,
  expectedMs: null,
});

/** Work that ends when it is told to. */
function held<T>(value: T): { work: () => Promise<T>; end: () => void; started: () => boolean } {
  let end = (): void => {};
  let started = false;
  const gate = new Promise<T>((resolve) => {
    end = () => resolve(value);
  });
  return {
    work: () => {
      started = true;
      return gate;
    },
    end: () => end(),
    started: () => started,
  };
}

describe('JobQueue', () => {
  it('runs as many jobs as its limit, the others in their order', async () => {
    const queue = new JobQueue(2);
    const parts = [held('a'), held('b'), held('c')];
    const jobs = parts.map(({ work }, i) => queue.add(`job ${i}`, work));
    expect(parts.map(({ started }) => started())).toEqual([true, true, false]);
    expect(jobs[2].progress.status).toBe('accepted');
    parts[1].end();
    expect(await jobs[1].result).toBe('b');
    await new Promise((resolve) => setTimeout(resolve, 0));
    expect(parts[2].started()).toBe(true);
    parts[0].end();
    parts[2].end();
    expect(await Promise.all([jobs[0].result, jobs[2].result])).toEqual(['a', 'c']);
    expect(jobs.map(({ progress }) => progress.status)).toEqual(['successful', 'successful', 'successful']);
  });

  it('answers a dismissal at once, though the work goes on until its next breath', async () => {
    const queue = new JobQueue(1);
    const { work, end } = held('late');
    const told: string[] = [];
    const job = queue.add('slow work', work, ({ status }) => told.push(status));
    const start = performance.now();
    job.dismiss();
    await expect(job.result).rejects.toMatchObject({
      code: 'cancelled',
      message: /^slow work was dismissed/,
    });
    expect(performance.now() - start).toBeLessThan(100);
    expect(job.progress.status).toBe('dismissed');
    end();
    await new Promise((resolve) => setTimeout(resolve, 5));
    expect(told).toEqual(['dismissed']);
  });

  it('does not start a job that was dismissed while it waited, and starts the next', async () => {
    const queue = new JobQueue(1);
    const parts = [held(1), held(2), held(3)];
    const jobs = parts.map(({ work }) => queue.add('job', work));
    jobs[1].dismiss();
    await expect(jobs[1].result).rejects.toMatchObject({ code: 'cancelled' });
    parts[0].end();
    parts[2].end();
    expect(await jobs[2].result).toBe(3);
    expect(parts[1].started()).toBe(false);
  });

  it('passes progress on and hands over the error of failed work', async () => {
    const queue = new JobQueue();
    const told: number[] = [];
    const job = queue.add(
      'job',
      async (_, tell) => {
        tell(running(40));
        throw new RangeError('of its own kind');
      },
      ({ percent }) => told.push(percent),
    );
    await expect(job.result).rejects.toThrow('of its own kind');
    expect(job.progress.status).toBe('failed');
    expect(told).toEqual([40, 40]);
  });

  it('tells the work by its signal that it was dismissed', async () => {
    const queue = new JobQueue();
    let aborted = false;
    const job = queue.add('job', (signal) => {
      signal.addEventListener('abort', () => {
        aborted = true;
      });
      return new Promise(() => {});
    });
    job.dismiss();
    await expect(job.result).rejects.toMatchObject({ code: 'cancelled' });
    expect(aborted).toBe(true);
  });
});
