import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { main } from '../../src/node/index.ts';
import { samplesFile } from '../processes/made-terrain.ts';
import { twoPonds } from '../processes/small-terrains.ts';
import { bundledBin } from './bundled-bin.ts';
import { FakeTerminal, overbrim } from './fake-terminal.ts';
import { WorkFolder } from './work-folder.ts';

const work = new WorkFolder();
const two = await work.terrain('two.tif', twoPonds);
const side = 1200;
// Minimal standard generator (Park & Miller 1988): rough ground with a pond every few cells, so that all steps take time.
let state = 1;
const rough = Float32Array.from({ length: side * side }, () => {
  state = (state * 48271) % 2147483647;
  return state / 2147483647;
});
const large = work.put('large.tif', await samplesFile(side, side, rough));

const bin = await bundledBin();

function start(...args: string[]): ChildProcess {
  return spawn(process.execPath, [bin, ...args], { stdio: ['ignore', 'ignore', 'pipe'] });
}

/** Interrupts a run as soon as `when` says so, and waits for its end. */
async function interrupted(out: string, when: (err: string) => boolean, signal: NodeJS.Signals = 'SIGINT') {
  const child = start('run', 'depressions', '--terrain', large, '--out', out);
  let err = '';
  let sent = false;
  const look = setInterval(() => {
    if (sent || !when(err)) return;
    sent = true;
    child.kill(signal);
  }, 2);
  child.stderr?.on('data', (chunk) => {
    err += chunk;
  });
  const code = await new Promise((done) => child.once('close', done));
  clearInterval(look);
  return { code, err, sent };
}

const partials = (folder: string) => readdirSync(folder).filter((name) => name.endsWith('.partial'));

describe('Ctrl-C', () => {
  it.each(['SIGINT', 'SIGTERM'] as const)(
    '%s while surveying leaves nothing and exits with 130',
    async (signal) => {
      const before = work.list();
      const { code, err, sent } = await interrupted(
        work.at('new', 'out'),
        (text) => text.includes('surveying'),
        signal,
      );
      expect({ code, sent }).toEqual({ code: 130, sent: true });
      expect(err).toMatch(
        /overbrim: The process depressions was dismissed at \d+ %; start it again when wanted\.\n$/,
      );
      expect(work.list()).toEqual(before);
    },
  );

  it('while writing leaves nothing and exits with 130', async () => {
    const before = work.list();
    const isWriting = () => partials(work.path).some((name) => existsSync(work.at(name, 'ponds.geojson')));
    const { code, err } = await interrupted(work.at('out'), isWriting);
    expect(code).toBe(130);
    expect(err).toMatch(
      /overbrim: The process depressions was dismissed while its results were written; .*\n$/,
    );
    expect(work.list()).toEqual(before);
  });

  it('leaves earlier results as they were', async () => {
    await overbrim('run', 'depressions', '--terrain', two, '--out', work.at('held'));
    const files = readdirSync(work.at('held'));
    const read = () => files.map((file) => readFileSync(work.at('held', file), 'utf8'));
    const before = read();
    const isWriting = () =>
      partials(work.at('held')).some((name) => existsSync(work.at('held', name, 'ponds.geojson')));
    expect((await interrupted(work.at('held'), isWriting)).code).toBe(130);
    expect(readdirSync(work.at('held'))).toEqual(files);
    expect(read()).toEqual(before);
  });

  it('ends a run in this process too, and is no longer listened to', async () => {
    const before = work.list();
    const terminal: FakeTerminal = new FakeTerminal(false, (text) => {
      if (text.includes('surveying')) terminal.interrupt();
    });
    expect(await main(['run', 'depressions', '--terrain', large, '--out', work.at('out')], terminal)).toBe(
      130,
    );
    expect(terminal.listening).toBe(0);
    expect(work.list()).toEqual(before);
  });
});

it('runs to its end when left alone', async () => {
  const child = start('run', 'depressions', '--terrain', two, '--out', work.at('alone'));
  expect(await new Promise((done) => child.once('close', done))).toBe(0);
  expect(work.json('alone', 'summary.json')).toMatchObject({ ponds: 2 });
  expect(await new Promise((done) => start('puddles').once('close', done))).toBe(2);
});
