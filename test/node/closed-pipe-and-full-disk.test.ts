import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { openSync } from 'node:fs';
import { expect, it } from 'vitest';
import { twoPonds } from '../processes/small-terrains.ts';
import { bundledBin } from './bundled-bin.ts';
import { WorkFolder } from './work-folder.ts';

const work = new WorkFolder();
const two = await work.terrain('two.tif', twoPonds);
const bin = await bundledBin();
const run = (out: string) => ['run', 'depressions', '--terrain', two, '--out', work.at(out)];
const results = ['brim-level.tif', 'ponds.geojson', 'pour-points.geojson', 'result.json', 'summary.json'];
const written = (out: string) => work.list().filter((path) => path.startsWith(`${out}/`));
const whole = (out: string) => results.map((file) => `${out}/${file}`);

/** Starts the command line with readers that leave at once. */
async function withoutReaders(args: string[], ...gone: ('stdout' | 'stderr')[]) {
  const child = spawn(process.execPath, [bin, ...args], { stdio: ['ignore', 'pipe', 'pipe'] });
  let err = '';
  child.stderr.on('data', (chunk) => {
    err += chunk;
  });
  for (const stream of gone) child[stream].destroy();
  const [code] = await once(child, 'close');
  return { code, err };
}

it.each([['list'], ['describe', 'depressions'], ['--help']])(
  'a closed pipe on standard output was a Node stack: %s %s ends quietly',
  async (...args) => {
    expect(await withoutReaders(args, 'stdout')).toEqual({ code: 0, err: '' });
  },
);

it('closed pipes broke a run off and left a hidden folder: it goes on to its end', async () => {
  const { code } = await withoutReaders(run('unread'), 'stdout', 'stderr');
  expect(code).toBe(0);
  expect(written('unread')).toEqual(whole('unread'));
  expect(work.list().filter((path) => path.includes('partial'))).toEqual([]);
});

/** /dev/full (Linux) answers every write with ENOSPC, as a full disk does (full(4)). */
async function ontoFullDisk(args: string[], ...full: ('stdout' | 'stderr')[]) {
  const device = openSync('/dev/full', 'w');
  const [stdout, stderr] = (['stdout', 'stderr'] as const).map((name) =>
    full.includes(name) ? device : 'pipe',
  );
  const child = spawn(process.execPath, [bin, ...args], { stdio: ['ignore', stdout, stderr] });
  let err = '';
  child.stdout?.resume();
  child.stderr?.on('data', (chunk) => {
    err += chunk;
  });
  const [code] = await once(child, 'close');
  return { code, err };
}

it('a full disk under standard output was a Node stack: it is told in a sentence, with exit code 1', async () => {
  const sentence =
    /^overbrim: Standard output could not be written \(.*ENOSPC.*\); write it where there is space\.$/m;
  const described = await ontoFullDisk(['describe', 'depressions'], 'stdout');
  expect(described.code).toBe(1);
  expect(described.err).toMatch(sentence);
  expect(described.err.trim().split('\n')).toHaveLength(1);
  const ran = await ontoFullDisk(run('untold'), 'stdout');
  expect(ran.code).toBe(1);
  expect(ran.err).toMatch(sentence);
  expect(written('untold')).toEqual(whole('untold'));
  const asJson = await ontoFullDisk(['list', '--json'], 'stdout');
  expect(JSON.parse(asJson.err)).toMatchObject({
    code: 'failed',
    message: expect.stringMatching(/^Standard/),
  });
});

it('a full disk under standard error broke a run off: it goes on to its end', async () => {
  expect((await ontoFullDisk(run('silent'), 'stderr')).code).toBe(0);
  expect(written('silent')).toEqual(whole('silent'));
});
