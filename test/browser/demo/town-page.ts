import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { Browser, BrowserContextOptions, Locator, Page } from 'playwright-core';
import proj4 from 'proj4';
import type {} from '../../../src/elements/index.ts';

/** Known of the invented town from its drawing. */
export const town = JSON.parse(
  readFileSync(new URL('../../../demo/town/town.json', import.meta.url), 'utf8'),
);

export interface Cell {
  readonly column: number;
  readonly row: number;
}

/** EPSG:32710 and EPSG:3857 as the EPSG register defines them. */
const inTown = proj4('+proj=utm +zone=10 +south +datum=WGS84 +units=m +no_defs');
const inMercator = proj4('EPSG:3857');

/** Easting and northing of the middle of a cell. */
export function middleOf({ column, row }: Cell): [number, number] {
  const { west, north, cellM } = town.grid;
  return [west + (column + 0.5) * cellM, north - (row + 0.5) * cellM];
}

/** Column and row, with fractions, of a longitude and latitude; whole numbers are the middles of cells. */
export function cellAt([longitude, latitude]: readonly number[]): Cell {
  const { west, north, cellM } = town.grid;
  const [x, y] = inTown.forward([longitude, latitude]);
  return { column: (x - west) / cellM - 0.5, row: (north - y) / cellM - 0.5 };
}

/** A page of the demo, and all that it complained of. */
export interface TownPage {
  readonly page: Page;
  readonly complaints: string[];
}

/** Opens a page of the demo and notes errors, warnings and whatever it asks of other places. */
export async function openPage(
  browser: Browser,
  url: string,
  options: BrowserContextOptions = {},
  prepare: (page: Page) => Promise<unknown> = async () => {},
): Promise<TownPage> {
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 }, ...options });
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(String(error)));
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type())) {
      complaints.push(`${message.location().url}: ${message.text()}`);
    }
  });
  page.on('request', (request) => {
    const asked = new URL(request.url());
    if (asked.origin !== new URL(url).origin && asked.protocol !== 'data:')
      complaints.push(`asks ${asked.href}`);
  });
  await prepare(page);
  await page.goto(url);
  return { page, complaints };
}

/** The ponds in the list. */
export function pondsOf(page: Page): Locator {
  return page.locator('brim-pour-points').getByRole('option');
}

/** Waits until the ponds are there and the map has come to rest. */
export async function pondsFound(page: Page): Promise<void> {
  await pondsOf(page).first().waitFor({ timeout: 40_000 });
  await atRest(page);
}

/** Waits until the map neither moves nor has anything left to draw. */
export function atRest(page: Page): Promise<void> {
  return page.evaluate(async () => {
    const map = document.querySelector('brim-host')?.session.state.map;
    if (!map) throw new Error('no map');
    const frame = () => new Promise((done) => requestAnimationFrame(done));
    do await frame();
    while (map.getView().getAnimating());
    await new Promise<void>((done) => {
      map.once('rendercomplete', () => done());
      map.render();
    });
  });
}

/** Clicks the map at the middle of a cell. */
export async function clickCell(page: Page, cell: Cell): Promise<void> {
  // A line that comes or goes beside the map changes its size, and with it where the cell lies on the page.
  await atRest(page);
  const own = middleOf(cell);
  const places = { own, mercator: inMercator.forward(inTown.inverse(own)) };
  const [x, y] = await page.evaluate(({ own, mercator }) => {
    const map = document.querySelector('brim-host')?.session.state.map;
    const target = map?.getTargetElement();
    if (!map || !target) throw new Error('no map');
    target.scrollIntoView({ block: 'nearest' });
    const isMercator = map.getView().getProjection().getCode() === 'EPSG:3857';
    const [left, top] = map.getPixelFromCoordinate(isMercator ? mercator : own);
    const box = target.getBoundingClientRect();
    return [box.left + left, box.top + top];
  }, places);
  await page.mouse.click(x, y);
}

const axeScript = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

/** What the accessibility engine finds wrong: rule and place. */
export async function axeViolations(page: Page): Promise<string[]> {
  await page.evaluate(axeScript);
  return page.evaluate(async () => {
    const { axe } = window as unknown as { axe: typeof import('axe-core') };
    const { violations } = await axe.run();
    return violations.flatMap(({ id, nodes }) =>
      nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')} – ${failureSummary}`),
    );
  });
}

/** How far a page reaches beyond its window, CSS pixels. */
export function sidewaysPx(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
}
