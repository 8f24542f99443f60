import { readFileSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { BrimSelectEvent } from '../../../src/elements/index.ts';
import { launchChromium } from '../chromium.ts';
import { violations } from './accessibility.ts';
import { openPage, type Stage, serveStage } from './stage.ts';

/** What the town's drawing says of its quarry; nothing of it comes from an analysis. */
const { quarry } = JSON.parse(readFileSync(new URL('../../../demo/town/town.json', import.meta.url), 'utf8'));
const truth: { spillElevationM: number; depthM: number; capacityM3: number } = quarry.ponds[0];

const body = `
<div id="map" tabindex="0" role="application" aria-label="Map"></div>
<main>
  <h1>Town</h1>
  <brim-host id="town" map="townMap" worker-url="/overbrim-worker.js">
    <brim-terrain src="town.tif"></brim-terrain>
    <brim-pour-points></brim-pour-points>
    <brim-spill-path></brim-spill-path>
  </brim-host>
  <brim-legend host="town"></brim-legend>
</main>`;

let stage: Stage;
let browser: Browser;

beforeAll(async () => {
  stage = await serveStage(body);
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await stage?.close();
});

const number = (value: number, digits: Intl.NumberFormatOptions): string =>
  new Intl.NumberFormat('en', digits).format(value);
const metres = (value: number): string => `${value.toFixed(2)}\u00a0m`;

let opened: Awaited<ReturnType<typeof openPage>>[] = [];

afterEach(async () => {
  for (const { page, complaints } of opened) {
    await page.close();
    expect(complaints).toEqual([]);
  }
  opened = [];
});

/** A page on which the ponds are found. */
async function town(options: Parameters<typeof openPage>[2] = {}): Promise<Page> {
  const open = await openPage(browser, stage.url, options);
  opened.push(open);
  await open.page.locator('brim-pour-points .pond').first().waitFor();
  return open.page;
}

/** Where a listed pond lies on the page. */
const pixelInside = (page: Page, place: number): Promise<{ x: number; y: number }> =>
  page.evaluate((at) => window.elementsStage.pixelInside(at), place);

const path = (page: Page): Promise<string> => page.evaluate(() => window.elementsStage.path());

const said = (page: Page, text: string | RegExp): Promise<void> =>
  page.locator('brim-host [part=said]', { hasText: text }).waitFor();

describe('the main job on the invented town', () => {
  it('finds the ponds as soon as the terrain is there, the quarry as its drawing has it', async () => {
    const page = await town();
    const first = page.locator('brim-pour-points .pond').first();
    expect(await first.textContent()).toContain(
      `${number(truth.capacityM3, { maximumSignificantDigits: 3 })}\u00a0m³`,
    );
    await first.click();
    const detail = page.locator('brim-pour-points [part=detail]');
    expect(await detail.textContent()).toContain(metres(truth.spillElevationM));
    expect(await detail.textContent()).toContain(`${metres(truth.depthM)} above its deepest ground`);
  });

  it('is done by keyboard alone', async () => {
    const page = await town();
    const focused = (): Promise<string> =>
      page.evaluate(() => {
        let at = document.activeElement;
        while (at?.shadowRoot?.activeElement) at = at.shadowRoot.activeElement;
        return `${at?.className} ${at?.textContent?.trim()}`;
      });
    const tabTo = async (wanted: string): Promise<void> => {
      for (let presses = 0; presses < 60; presses++) {
        await page.keyboard.press('Tab');
        if ((await focused()).includes(wanted)) return;
      }
      throw new Error(`60 presses of Tab did not reach ${wanted}`);
    };
    await tabTo('pond ');
    await page.keyboard.press('PageDown');
    await page.keyboard.press('PageUp');
    await page.keyboard.press('End');
    await page.keyboard.press('Home');
    await page.keyboard.press('ArrowDown');
    await page.keyboard.press('Enter');
    await said(page, /^Pond 2 selected/);
    expect(await page.locator('brim-pour-points .pond[aria-selected=true]').count()).toBe(1);
    await tabTo('Trace its overflow');
    await page.keyboard.press('Enter');
    await page.locator('brim-spill-path .leg').first().waitFor();
    await tabTo('leg');
    await page.locator('brim-spill-path .leg.pointed').waitFor();
  });

  it('selects the pond that is clicked on the map, and none beside all ponds', async () => {
    const page = await town();
    const { x, y } = await pixelInside(page, 0);
    await page.mouse.click(x, y);
    await page.locator('brim-pour-points .pond[aria-selected=true]').waitFor();
    await said(page, /^Pond 1 selected/);
    await page.mouse.click(2, 2);
    await page.locator('brim-pour-points [part=detail]').waitFor({ state: 'detached' });
  });

  it('lets a page veto a selection', async () => {
    const page = await town();
    await page.evaluate(() => {
      addEventListener('brim-select', (event) => {
        document.title = String((event as BrimSelectEvent).pond);
        event.preventDefault();
      });
    });
    await page.locator('brim-pour-points .pond').first().click();
    expect(await page.title()).toMatch(/^pit-.*-sill-/);
    expect(await page.locator('brim-pour-points [part=detail]').count()).toBe(0);
  });

  it('traces the same path from a click and from the typed coordinate, whatever that is in', async () => {
    const page = await town();
    const { x, y } = await pixelInside(page, 2);
    await page.getByRole('button', { name: 'Pick on the map' }).click();
    await page.mouse.click(x, y);
    await page.locator('brim-spill-path .leg').first().waitFor();
    const clicked = await path(page);
    const selected = await page.locator('brim-pour-points .pond[aria-selected=true]').count();
    expect(selected).toBe(0);
    const field = page.locator('brim-spill-path #place');
    const terrain = await field.inputValue();
    expect(terrain).toMatch(/^47\d{4}\.\d\d, 458\d{4}\.\d\d$/);
    const typed = await page.evaluate(([px, py]) => window.elementsStage.typedAt(px, py), [x, y]);
    for (const [crs, text] of [
      ['terrain', terrain],
      ['lonLat', typed.lonLat],
      ['view', typed.view],
    ]) {
      await page.getByRole('button', { name: 'Clear' }).click();
      await page.locator('brim-spill-path select').selectOption(crs);
      await field.fill(text);
      await field.press('Enter');
      await page.locator('brim-spill-path .leg').first().waitFor();
      expect(await path(page), crs).toBe(clicked);
    }
  });

  it('marks a leg on the map that is pointed at in the list', async () => {
    const page = await town();
    await page.locator('brim-pour-points .pond').first().click();
    await page.getByRole('button', { name: 'Trace its overflow' }).click();
    await page.locator('brim-spill-path .leg').first().hover();
    const marked = () => page.evaluate(() => window.elementsStage.markedLegs());
    expect(await marked()).toBe(1);
    await page.mouse.move(1, 1);
    expect(await marked()).toBe(0);
  });

  it('reads out ground and water under the pointer', async () => {
    const page = await town();
    const { x, y } = await pixelInside(page, 0);
    await page.mouse.move(x, y);
    const readOut = page.locator('brim-legend [part=read-out]');
    await readOut.filter({ hasText: `water ${metres(truth.spillElevationM)}` }).waitFor();
  });

  it('filters by least sizes in the units of the reader, and refuses what is no number', async () => {
    const page = await town();
    const field = page.getByRole('textbox', { name: 'depth' });
    await field.fill('deep');
    await field.press('Enter');
    expect(await field.getAttribute('aria-invalid')).toBe('true');
    await page.evaluate(() => document.querySelector('brim-host')?.setAttribute('units', 'us'));
    await page.locator('brim-pour-points', { hasText: 'acre-ft' }).waitFor();
    // 11 m are 36.09 ft: at 36 ft only the quarry is left, at 37 ft nothing.
    await field.fill('36');
    await field.press('Enter');
    await said(page, '1 pond found.');
    await field.fill('37');
    await field.press('Enter');
    await said(page, '0 ponds found.');
    await page.locator('brim-pour-points', { hasText: 'No pond is left by these least sizes' }).waitFor();
  });

  it('hides and shows what the legend switches', async () => {
    const page = await town();
    const isVisible = (): Promise<boolean | undefined> =>
      page.evaluate(() => window.elementsStage.state().layers?.wet.getVisible());
    expect(await isVisible()).toBe(true);
    await page.getByRole('checkbox', { name: 'Show: Water, brimful' }).uncheck();
    expect(await isVisible()).toBe(false);
  });

  it.each(['light', 'dark'] as const)(
    'has no fault that an accessibility engine finds, %s',
    async (colorScheme) => {
      const page = await town({ colorScheme });
      await page.locator('brim-pour-points .pond').first().click();
      await page.getByRole('button', { name: 'Trace its overflow' }).click();
      await page.locator('brim-spill-path .leg').first().waitFor();
      expect(await violations(page)).toEqual([]);
    },
  );

  it('fits a narrow window', async () => {
    const page = await town({ viewport: { width: 320, height: 640 } });
    await page.locator('brim-pour-points .pond').first().click();
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(320);
  });
});
