import { readFileSync } from 'node:fs';
import { fromArrayBuffer } from 'geotiff';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { basin } from '../../../demo/town/basin.ts';
import { launchChromium } from '../chromium.ts';
import { type DemoSite, startDemo } from './demo-site.ts';
import {
  atRest,
  axeViolations,
  type Cell,
  cellAt,
  clickCell,
  middleOf,
  openPage,
  pondsFound,
  pondsOf,
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
  [site, browser] = await Promise.all([startDemo('main'), launchChromium(['--disable-gpu'])]);
});

afterEach(async () => {
  expect(opened.complaints).toEqual([]);
  await opened.page.context().close();
});

afterAll(async () => {
  await browser?.close();
  expect(await site?.stop()).toBe(0);
});

async function openTown(options = {}, prepare?: (page: Page) => Promise<unknown>): Promise<Page> {
  opened = await openPage(browser, site.url, options, prepare);
  if (!prepare) await pondsFound(opened.page);
  return opened.page;
}

/** Vertices of the traced path, leg by leg, as cells with fractions. */
function pathCells(page: Page): Promise<{ kind: string; cells: Cell[] }[]> {
  return page
    .evaluate(() => {
      const path = document.querySelector('brim-host')?.session.state.path;
      return path?.lines.features.map(({ geometry, properties }) => ({
        kind: String(properties?.kind),
        places: geometry.type === 'LineString' ? geometry.coordinates : [],
      }));
    })
    .then((legs) => (legs ?? []).map(({ kind, places }) => ({ kind, cells: places.map(cellAt) })));
}

describe('the town by modules', () => {
  it('finds the ponds at once, the quarry first as it is drawn', async () => {
    const page = await openTown();
    const [quarry] = town.quarry.ponds;
    expect(quarry).toMatchObject({ capacityM3: 274_860, areaM2: 45_144, depthM: 11 });
    const first = (await pondsOf(page).first().textContent()) ?? '';
    // \s also takes the no-break spaces between numbers and units.
    expect(first.replace(/\s+/g, ' ').trim()).toBe('Pond 1 Holds 275,000 m³ Area 4.51 ha Depth 11.00 m');
    await expect(page.getByText('Screening from terrain alone:').isVisible()).resolves.toBe(true);
  });

  it('says of a clicked pond where and at which level it overflows, and draws the way along the cells', async () => {
    const page = await openTown();
    await clickCell(page, basinMiddle);
    const detail = page.locator('brim-pour-points').locator('[part=detail]');
    const said = ((await detail.textContent()) ?? '').replaceAll('\u00a0', ' ');
    expect(said).toContain(`${town.basin.weirM.toFixed(2)} m`);
    expect(said).toContain(`${town.basin.depthM.toFixed(2)} m above its deepest ground`);
    const pond = await page.evaluate(() => {
      const { selected, ponds } = document.querySelector('brim-host')?.session.state ?? {};
      return selected ? ponds?.byId.get(selected) : undefined;
    });
    expect(pond).toMatchObject({
      spillElevationM: town.basin.weirM,
      capacityM3: town.basin.capacityM3,
      depthM: town.basin.depthM,
    });
    const weir = cellAt(pond?.pourPoint ?? []);
    // In the notch of the south side: its columns, from the bottom of the slope to the outer foot of the crest.
    const bottom = basin.y + basin.height;
    expect(weir.column).toBeGreaterThanOrEqual(basin.weirX - 0.1);
    expect(weir.column).toBeLessThan(basin.weirX + basin.weirWidth);
    expect(weir.row).toBeGreaterThanOrEqual(bottom - 0.1);
    expect(weir.row).toBeLessThan(bottom + (basin.crest - basin.floor) / basin.rise + basin.crestWidth);

    await page.getByRole('button', { name: 'Trace its overflow' }).click();
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    const legs = await pathCells(page);
    await checkPath(legs, weir);
    // Drawn on the map, leg by leg.
    const drawn = await page.evaluate(
      () => document.querySelector('brim-host')?.session.state.layers?.path.getSource()?.getFeatures().length,
    );
    expect(drawn).toBe(legs.length);
  });

  it('gives the same path for a typed coordinate as for a click', async () => {
    const page = await openTown();
    const start: Cell = { column: 1300, row: 300 };
    await page.getByRole('button', { name: 'Pick on the map' }).click();
    await clickCell(page, start);
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    const clicked = await pathCells(page);
    const [{ column, row }] = clicked[0].cells;
    expect(Math.hypot(column - start.column, row - start.row)).toBeLessThan(4);
    await page.getByRole('button', { name: 'Clear' }).click();
    expect(await pathCells(page)).toEqual([]);
    const [x, y] = middleOf({ column: Math.round(column), row: Math.round(row) });
    await page.getByLabel('Or type a coordinate').fill(`${x + 0.3}, ${y - 0.3}`);
    await page.getByRole('button', { name: 'Trace', exact: true }).click();
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    expect(await pathCells(page)).toEqual(clicked);
  });

  it('cancels at once and keeps the terrain', async () => {
    const page = await openTown();
    await page.route('**/slow.tif', () => {});
    await page.evaluate(() => document.querySelector('brim-terrain')?.setAttribute('src', 'slow.tif'));
    const cancel = page.getByRole('button', { name: 'Cancel: Surveying the terrain' });
    await cancel.waitFor();
    const running = await cancel.evaluate(async (button: HTMLButtonElement) => {
      button.click();
      await new Promise((done) => setTimeout(done, 0));
      return document.querySelector('brim-host')?.session.running.jobs.length;
    });
    expect(running).toBe(0);
    await page.getByText('was cancelled. What was there before is still there.').waitFor();
    expect(await cancel.count()).toBe(0);
    await clickCell(page, basinMiddle);
    await page.getByRole('button', { name: 'Trace its overflow' }).click();
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
  });

  it('says in a sentence what is wrong with a file, and keeps the terrain', async () => {
    const page = await openTown();
    await page.locator('brim-terrain input[type=file]').setInputFiles({
      name: 'minutes.txt',
      mimeType: 'text/plain',
      buffer: Buffer.from('Minutes of the drainage board'),
    });
    const alert = page.getByRole('alert').filter({ hasText: 'minutes.txt' });
    await alert.waitFor();
    expect(await alert.textContent()).toMatch(/minutes\.txt.*TIFF/s);
    expect(await pondsOf(page).count()).toBe(8);
  });

  it('asks for a missing unit and goes on with the answer', async () => {
    const page = await openTown();
    await page
      .locator('brim-terrain input[type=file]')
      .setInputFiles(pathOf('test/data/olinda_dem_utm25s.tif'));
    await page.getByText('In which unit are the elevations?').waitFor();
    await page.getByLabel('metres', { exact: true }).check();
    await page.getByRole('button', { name: 'Use this unit' }).click();
    await page.getByText('olinda_dem_utm25s.tif', { exact: true }).waitFor();
    await pondsOf(page).first().waitFor();
  });

  it('does the main job by keyboard alone', async () => {
    const page = await openTown();
    const { focused, tabTo } = keysOn(page);
    await page.keyboard.press('Tab');
    expect(await focused()).toBe('Skip the map, go to the ponds');
    await page.keyboard.press('Enter');
    await tabTo(/^Pond 1 /);
    await page.keyboard.press('ArrowDown');
    expect(await focused()).toMatch(/^Pond 2 /);
    await page.keyboard.press('Enter');
    await page.locator('brim-pour-points [part=detail]').waitFor();
    await tabTo(/^Trace its overflow$/);
    await page.keyboard.press('Enter');
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    await tabTo(/over land|through/);
  });

  it('leads to the ponds by the Tab key alone, past the skip link', async () => {
    const { focused, tabTo } = keysOn(await openTown());
    await tabTo(/^Map of Brimsallow/);
    await tabTo(/^Pond 1 /);
    expect(await focused()).toMatch(/^Pond 1 Holds/);
  });

  it.each(['light', 'dark'] as const)('has no accessibility fault in the %s', async (colorScheme) => {
    const page = await openTown({ colorScheme });
    expect(await axeViolations(page)).toEqual([]);
    await clickCell(page, basinMiddle);
    await page.getByRole('button', { name: 'Trace its overflow' }).click();
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    await atRest(page);
    expect(await axeViolations(page)).toEqual([]);
  });

  it.each([360, 390, 768, 1440, 1920])('fits a window %i px wide', async (width) => {
    const page = await openTown({ viewport: { width, height: 844 } });
    await clickCell(page, basinMiddle);
    await page.getByRole('button', { name: 'Trace its overflow' }).click();
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    expect(await sidewaysPx(page)).toBe(0);
  });
});

/** What has the focus, by its name, and a way to reach something with the Tab key. */
function keysOn(page: Page) {
  const focused = () =>
    page.evaluate(() => {
      let at = document.activeElement;
      while (at?.shadowRoot?.activeElement) at = at.shadowRoot.activeElement;
      const name = at?.getAttribute('aria-label') ?? at?.textContent ?? '';
      return name.replace(/\s+/g, ' ').trim();
    });
  const tabTo = async (name: RegExp): Promise<void> => {
    for (let presses = 0; presses < 25; presses++) {
      await page.keyboard.press('Tab');
      if (name.test(await focused())) return;
    }
    throw new Error(`Tab does not reach ${name}; it is at "${await focused()}".`);
  };
  return { focused, tabTo };
}

/** Each vertex is the middle of a cell, water never runs uphill over land, and the way ends on the rim. */
async function checkPath(legs: { kind: string; cells: Cell[] }[], weir: Cell): Promise<void> {
  // An independent reader of the file.
  const { buffer } = new Uint8Array(readFileSync(pathOf('demo/town/elevation.tif')));
  const image = await (await fromArrayBuffer(buffer)).getImage();
  const ground = (await image.readRasters({ interleave: true })) as Float32Array;
  const { columns, rows } = town.grid;
  const groundAt = ({ column, row }: Cell) => ground[Math.round(row) * columns + Math.round(column)];
  for (const { kind, cells } of legs) {
    for (const [i, cell] of cells.entries()) {
      expect(Math.abs(cell.column - Math.round(cell.column))).toBeLessThan(0.02);
      expect(Math.abs(cell.row - Math.round(cell.row))).toBeLessThan(0.02);
      if (kind === 'land' && i > 0) expect(groundAt(cell)).toBeLessThanOrEqual(groundAt(cells[i - 1]));
    }
  }
  const all = legs.flatMap(({ cells }) => cells);
  const passes = all.some(({ column, row }) => Math.hypot(column - weir.column, row - weir.row) < 0.1);
  expect(passes).toBe(true);
  const { column, row } = all[all.length - 1];
  const onRim = [column, columns - 1 - column, row, rows - 1 - row].some((off) => Math.abs(off) < 0.1);
  expect(onRim).toBe(true);
}
