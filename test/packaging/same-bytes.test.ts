import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type * as page from '../../src/script.ts';
import { launchChromium } from '../browser/chromium.ts';
import { type Served, served } from './served.ts';

/** What `overbrim.js` leaves on a page. */
declare const overbrim: typeof page;

const root = resolve(import.meta.dirname, '../..');
const jobs = [
  { id: 'depressions', inputs: { minDepth: 0.2, nested: true }, args: ['--min-depth', '0.2', '--nested'] },
  { id: 'spill-path', inputs: { from: '470600,4587700' }, args: ['--from', '470600,4587700'] },
];

let browser: Browser;
let folder = '';
/** SHA-256 of each file that the command line writes. */
const written = new Map<string, Record<string, string>>();

beforeAll(async () => {
  browser = await launchChromium();
  folder = mkdtempSync(join(tmpdir(), 'overbrim-bytes-'));
  for (const { id, args } of jobs) {
    const out = join(folder, id);
    const terrain = join(root, 'demo/town/elevation.tif');
    execFileSync(process.execPath, [
      ...[join(root, 'dist/node/bin.js'), 'run', id, '--terrain', terrain, '--out', out, '--json', ...args],
    ]);
    const { outputs } = JSON.parse(readFileSync(join(out, 'result.json'), 'utf8'));
    written.set(
      id,
      Object.fromEntries(outputs.map(({ output, sha256 }: Record<string, string>) => [output, sha256])),
    );
  }
});
afterAll(async () => {
  await browser?.close();
  rmSync(folder, { recursive: true, force: true });
});

async function onPage<T>(
  policy: string | undefined,
  ask: (tab: Page, server: Served) => Promise<T>,
): Promise<T> {
  const head = '<script src="/node_modules/ol/dist/ol.js"></script><script src="/dist/overbrim.js"></script>';
  const server = await served(policy === undefined ? { head } : { head, policy });
  const tab = await browser.newPage();
  try {
    await tab.goto(server.url);
    return await ask(tab, server);
  } finally {
    await tab.close();
    await server.close();
  }
}

describe.each([
  ['worker', undefined],
  ['main thread', "default-src 'self'; worker-src 'none'"],
])('in the %s of a page', (place, policy) => {
  test.each(jobs)('$id gives the bytes that the command line writes', async ({ id, inputs }) => {
    const answer = await onPage(policy, (tab, server) =>
      tab.evaluate(
        async ({ id, inputs, terrain }) => {
          const engine = await overbrim.openEngine();
          const { outputs } = await engine.run(id, { terrain: [terrain], ...inputs }).result;
          const hashes: Record<string, string> = {};
          for (const [name, { bytes }] of Object.entries(outputs)) {
            const digest = await crypto.subtle.digest('SHA-256', bytes as Uint8Array<ArrayBuffer>);
            hashes[name] = [...new Uint8Array(digest)]
              .map((byte) => byte.toString(16).padStart(2, '0'))
              .join('');
          }
          return { place: engine.place, hashes };
        },
        { id, inputs, terrain: `${server.url}/demo/town/elevation.tif` },
      ),
    );
    expect(answer.place).toBe(place);
    expect(answer.hashes).toEqual(written.get(id));
  });
});

test('a dismissed job answers within 100 ms and leaves the terrain to the next question', async () => {
  const answer = await onPage(undefined, (tab, server) =>
    tab.evaluate(async (terrain) => {
      const engine = await overbrim.openEngine();
      const inputs = { terrain: [terrain] };
      await engine.view(inputs).result;
      const waits: number[] = [];
      const codes: string[] = [];
      for (const afterMs of [0, 30, 150]) {
        const job = engine.run('depressions', { ...inputs, neighbours: afterMs === 30 ? 4 : 8 });
        await new Promise((resolve) => setTimeout(resolve, afterMs));
        const start = performance.now();
        job.dismiss();
        codes.push(
          await job.result.then(
            () => 'ended before',
            (error) => error.code,
          ),
        );
        waits.push(performance.now() - start);
      }
      const told: string[] = [];
      const { outputs } = await engine.run('depressions', inputs, ({ doing }) => told.push(doing)).result;
      return { waits, codes, told, outputs: Object.keys(outputs) };
    }, `${server.url}/demo/town/elevation.tif`),
  );
  for (const wait of answer.waits) expect(wait).toBeLessThan(100);
  expect(answer.codes).toEqual(['cancelled', 'cancelled', 'cancelled']);
  expect(answer.told).not.toContain('reading elevation');
  expect(answer.outputs).toEqual(['ponds', 'pour-points', 'brim-level', 'summary']);
});

test('the record of the command line is that of its files', () => {
  for (const { id } of jobs) {
    const { outputs } = JSON.parse(readFileSync(join(folder, id, 'result.json'), 'utf8'));
    for (const { file, sha256 } of outputs) {
      const bytes = readFileSync(join(folder, id, file));
      expect(createHash('sha256').update(bytes).digest('hex')).toBe(sha256);
    }
  }
});
