import { readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { Script } from 'node:vm';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type * as page from '../../src/script.ts';
import { launchChromium } from '../browser/chromium.ts';
import { type Served, type Serving, served } from './served.ts';

/** What `overbrim.js` leaves on a page. */
declare const overbrim: typeof page;

const root = resolve(import.meta.dirname, '../..');
const dist = (file: string): string => readFileSync(join(root, 'dist', file), 'utf8');
const hashes: Readonly<Record<string, string>> = JSON.parse(dist('hashes.json'));

let browser: Browser;
beforeAll(async () => {
  browser = await launchChromium();
});
afterAll(() => browser?.close());

const tag = (src: string, integrity = ''): string =>
  `<script src="${src}"${integrity && ` integrity="${integrity}" crossorigin="anonymous"`}></script>`;
const openLayers = tag('/node_modules/ol/dist/ol.js');
const ours = tag('/dist/overbrim.js', hashes['overbrim.js']);

/** Opens a page of its own server, asks it, and closes both. */
async function onPage<T>(serving: Serving, ask: (opened: Opened) => Promise<T>): Promise<T> {
  const server = await served(serving);
  const tab = await browser.newPage();
  const errors: string[] = [];
  tab.on('pageerror', (error) => errors.push(error.message));
  try {
    await tab.goto(server.url);
    return await ask({ tab, errors, server });
  } finally {
    await tab.close();
    await server.close();
  }
}

interface Opened {
  readonly tab: Awaited<ReturnType<Browser['newPage']>>;
  readonly errors: string[];
  readonly server: Served;
}

/** Surveys a fixture in the page's engine: where it ran, what was said, the cells, the CRS. */
async function surveyed({ tab, server }: Opened, fixture: string, workerUrl?: string) {
  return tab.evaluate(
    async ({ terrain, workerUrl }) => {
      const said: string[] = [];
      const engine = await overbrim.openEngine({
        ...(workerUrl === undefined ? {} : { workerUrl }),
        onStepBack: (sentence) => said.push(sentence),
      });
      const processes = (await engine.descriptions()).map(({ id }) => id);
      const { view } = await engine.view({ terrain: [terrain], verticalUnit: 'm' }).result;
      engine.close();
      return {
        place: engine.place,
        said,
        processes,
        elevationM: [...view.elevationM],
        crs: view.georeference.crs.name,
      };
    },
    { terrain: `${server.url}/test/data/reader/${fixture}.tif`, workerUrl },
  );
}

/** Cells as an independent raster library read them: see test/data/make_reader_fixtures.py. */
const expectedCells = (fixture: string): number[] =>
  JSON.parse(readFileSync(join(root, 'test/data/reader/expected.json'), 'utf8')).files[fixture].values;

describe('the scripts as text', () => {
  const scripts = ['overbrim.js', 'overbrim-worker.js'];

  test.each(scripts)('%s parses as a plain script and makes no code at run time', (file) => {
    expect(() => new Script(dist(file))).not.toThrow();
    // A strict page forbids both; not a matcher on the text, which would print it all.
    expect(/\beval\s*\(|\bFunction\s*\(/.test(dist(file))).toBe(false);
  });

  test.each(scripts)('%s holds no OpenLayers', (file) => {
    const { sources }: { sources: string[] } = JSON.parse(dist(`${file}.map`));
    expect(sources.length).toBeGreaterThan(20);
    expect(sources.filter((source) => /node_modules\/ol7?\//.test(source))).toEqual([]);
  });

  test('what is large and rarely used lies beside them', () => {
    for (const file of scripts) {
      const { sources }: { sources: string[] } = JSON.parse(dist(`${file}.map`));
      expect(sources.filter((source) => /zstddec|geokeys/.test(source))).toEqual([]);
    }
  });

  test('the licence of each package in them is given', () => {
    const { sources }: { sources: string[] } = JSON.parse(dist('overbrim.js.map'));
    const packages = sources.flatMap(
      (source) => /node_modules\/((?:@[^/]+\/)?[^/]+)/.exec(source)?.[1] ?? [],
    );
    expect(packages).toContain('lit-html');
    for (const name of new Set(packages))
      expect(dist('licences.txt')).toMatch(new RegExp(`^${name} \\d`, 'm'));
  });
});

describe('on a page with OpenLayers', () => {
  test.each(['ol', 'ol7'])('of %s, under a strict policy, the engine answers from a worker', async (ol) => {
    const head = tag(`/node_modules/${ol}/dist/ol.js`) + ours;
    const answer = await onPage({ head, policy: "default-src 'self'" }, async (opened) => ({
      ...(await surveyed(opened, 'strips-float32')),
      errors: opened.errors,
    }));
    expect(answer).toMatchObject({ place: 'worker', said: [], errors: [] });
    expect(answer.processes).toContain('depressions');
    expect(answer.elevationM).toEqual(expectedCells('strips-float32'));
  });

  test('elements are defined by the script alone', async () => {
    const defined = await onPage({ head: openLayers + ours }, ({ tab }) =>
      tab.evaluate(() => customElements.get('brim-host') === overbrim.BrimHost),
    );
    expect(defined).toBe(true);
  });

  test.each(['zstd', 'user-defined-feet'])('a worker loads its part for %s', async (fixture) => {
    const answer = await onPage({ head: openLayers + ours }, (opened) => surveyed(opened, fixture));
    expect(answer.place).toBe('worker');
    if (fixture === 'zstd') expect(answer.elevationM).toEqual(expectedCells(fixture));
    expect(answer.crs).not.toBe('');
  });

  test('that allows no workers, the main thread works and loads its parts', async () => {
    const policy = "worker-src 'none'";
    const answer = await onPage({ head: openLayers + ours, policy }, (opened) => surveyed(opened, 'zstd'));
    expect(answer.place).toBe('main thread');
    expect(answer.said.length).toBeGreaterThan(0);
    expect(answer.elevationM).toEqual(expectedCells('zstd'));
  });

  test.each(['strips-float32', 'zstd'])(
    'of another origin, a worker inside a blob reads %s',
    async (fixture) => {
      const far = await served({ head: '', open: true });
      try {
        const head = openLayers + tag(`${far.url}/dist/overbrim.js`, hashes['overbrim.js']);
        const answer = await onPage({ head }, (opened) => surveyed(opened, fixture));
        expect(answer.place).toBe('inline worker');
        expect(answer.elevationM).toEqual(expectedCells(fixture));
      } finally {
        await far.close();
      }
    },
  );

  test('a worker under another name and address does the same', async () => {
    const far = '/dist/overbrim-worker.js?renamed';
    const answer = await onPage({ head: openLayers + ours }, (opened) => surveyed(opened, 'zstd', far));
    expect(answer).toMatchObject({ place: 'worker', said: [] });
    expect(answer.elevationM).toEqual(expectedCells('zstd'));
  });
});

test('a page without OpenLayers is told in one sentence what to load', async () => {
  const errors = await onPage({ head: ours }, async (opened) => opened.errors);
  expect(errors).toEqual([
    'overbrim.js finds no OpenLayers on this page; load its full build (ol.js, version 7.5 to 10) by a script tag before overbrim.js.',
  ]);
});
