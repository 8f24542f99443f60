import { readFileSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium } from '../chromium.ts';
import { type DemoSite, startDemo } from './demo-site.ts';
import {
  axeViolations,
  type Cell,
  clickCell,
  openPage,
  pondsFound,
  sidewaysPx,
  type TownPage,
  town,
} from './town-page.ts';

/** Expectations come from the drawing of the invented town (town.json), never from an analysis. */
const pathOf = (file: string) => new URL(`../../../${file}`, import.meta.url).pathname;
const basinMiddle: Cell = {
  column: town.basin.floor.column + town.basin.floor.columns / 2,
  row: town.basin.floor.row + town.basin.floor.rows / 2,
};

let browser: Browser;
let site: DemoSite;
let opened: TownPage;

beforeAll(async () => {
  [site, browser] = await Promise.all([startDemo('plain'), launchChromium(['--disable-gpu'])]);
});

afterEach(async () => {
  expect(opened.complaints).toEqual([]);
  await opened.page.context().close();
});

afterAll(async () => {
  await browser?.close();
  expect(await site?.stop()).toBe(0);
});

async function openPlain(options = {}, prepare?: (page: Page) => Promise<unknown>): Promise<Page> {
  opened = await openPage(browser, `${site.url}plain/`, options, prepare);
  await pondsFound(opened.page);
  return opened.page;
}

async function overflowOfBasin(page: Page): Promise<string> {
  await clickCell(page, basinMiddle);
  const detail = page.locator('brim-pour-points [part=detail]');
  return ((await detail.textContent()) ?? '').replaceAll('\u00a0', ' ');
}

/** The old and the new end of what we take of OpenLayers. */
const oldOpenLayers = (page: Page) =>
  Promise.all([
    page.route('**/ol.js', (route) => route.fulfill({ path: pathOf('node_modules/ol7/dist/ol.js') })),
    page.route('**/ol.css', (route) => route.fulfill({ path: pathOf('node_modules/ol7/ol.css') })),
  ]);

describe('the plain page, by one script tag', () => {
  it.each([
    ['10', undefined],
    ['7', oldOpenLayers],
  ])('says where a clicked pond overflows, on OpenLayers %s', async (version, prepare) => {
    const page = await openPlain({}, prepare);
    const found = await page.evaluate(() => Reflect.get(window, 'ol').util.VERSION);
    expect(String(found).split('.')[0]).toBe(version);
    expect(await overflowOfBasin(page)).toContain(`${town.basin.weirM.toFixed(2)} m`);
    // OpenLayers 7 tries a worker inside a blob of its own as soon as it is loaded, with or without us.
    if (version === '7') {
      expect(opened.complaints.splice(0, 1)).toEqual([
        expect.stringMatching(/\/ol\.js: Creating a worker from 'blob:/),
      ]);
    }
  });

  it('runs the snippet of the README when it is pasted into a page with a map', async () => {
    const readme = readFileSync(pathOf('README.md'), 'utf8');
    const snippet = /```html\n(.*?)```/s.exec(readme)?.[1] ?? '';
    expect(snippet.match(/<script/g)).toHaveLength(1);
    const body = `<!doctype html><html lang="en"><head><title>Pasted</title><link rel="icon" href="crest.svg">
      <link rel="stylesheet" href="ol.css"></head><body><div id="map" style="height: 400px"></div>
      <script src="ol.js"></script><script src="map.js"></script>${snippet}</body></html>`;
    const page = await openPlain({}, (fresh) =>
      fresh.route('**/plain/', (route) => route.fulfill({ contentType: 'text/html', body })),
    );
    expect(await page.title()).toBe('Pasted');
    expect(await overflowOfBasin(page)).toContain(`${town.basin.weirM.toFixed(2)} m`);
    // The plain page is made of the very lines.
    const lines = (text: string) =>
      text
        .split('\n')
        .map((line) => line.trim())
        .filter(Boolean);
    const plain = lines(readFileSync(pathOf('demo/plain/index.html'), 'utf8')).join('\n');
    expect(plain).toContain(lines(snippet).join('\n'));
  });

  it.each(['light', 'dark'] as const)('has no accessibility fault in the %s', async (colorScheme) => {
    const page = await openPlain({ colorScheme });
    expect(await axeViolations(page)).toEqual([]);
    await overflowOfBasin(page);
    expect(await axeViolations(page)).toEqual([]);
  });

  it.each([360, 390, 768, 1440, 1920])('fits a window %i px wide', async (width) => {
    const page = await openPlain({ viewport: { width, height: 844 } });
    await overflowOfBasin(page);
    expect(await sidewaysPx(page)).toBe(0);
  });
});
