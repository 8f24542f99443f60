import { readFileSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium } from '../chromium.ts';
import { violations } from './accessibility.ts';
import { openPage, type Stage, serveStage } from './stage.ts';

const demoTown = new URL('../../../demo/town/elevation.tif', import.meta.url).pathname;
const olinda = readFileSync(new URL('../../data/olinda_dem_utm25s.tif', import.meta.url));

let stage: Stage;
let browser: Browser;
let opened: Awaited<ReturnType<typeof openPage>>[] = [];

beforeAll(async () => {
  stage = await serveStage('', { '/olinda.tif': olinda, '/broken.tif': 'this is no elevation' });
  browser = await launchChromium();
});

afterEach(async () => {
  for (const { page } of opened) await page.close();
  opened = [];
});

afterAll(async () => {
  await browser?.close();
  await stage?.close();
});

/** The elements on a page with a map under the name townMap. */
async function pageWith(elements: string): Promise<Page> {
  const open = await openPage(browser, stage.url);
  opened.push(open);
  await open.page.evaluate((html) => {
    document.body.innerHTML = `<div id="map"></div><main><h1>Trouble</h1>${html}</main>`;
    window.townMap.setTarget('map');
  }, elements);
  return open.page;
}

const hostWith = (inside: string, attributes = 'map="townMap"'): string =>
  `<brim-host ${attributes} worker-url="/overbrim-worker.js">${inside}</brim-host>`;
const fault = (page: Page) => page.locator('brim-host [part=fault] span');
const unit = '<brim-terrain src="olinda.tif"></brim-terrain><brim-pour-points></brim-pour-points>';

describe('the vertical unit', () => {
  it('is asked for where the file does not name it, and nothing is proposed', async () => {
    const page = await pageWith(hostWith(unit));
    const question = page.getByRole('group', { name: 'In which unit are the elevations?' });
    await question.waitFor();
    expect(await question.getByRole('radio', { checked: true }).count()).toBe(0);
    expect(await fault(page).count()).toBe(0);
    expect(await violations(page)).toEqual([]);
    await page.getByRole('radio', { name: 'metres' }).check();
    await page.getByRole('button', { name: 'Use this unit' }).click();
    await page.locator('brim-pour-points .pond').first().waitFor();
    expect(await question.count()).toBe(0);
  });

  it('can be changed afterwards, and every level with it', async () => {
    const page = await pageWith(hostWith(unit.replace('src=', 'vertical-unit="m" src=')));
    const facts = page.locator('brim-terrain dl');
    await facts.waitFor();
    const range = async (): Promise<number> => {
      const text = (await facts.textContent()) ?? '';
      return Number(/to ([\d.]+)\u00a0m/.exec(text)?.[1]);
    };
    const inMetres = await range();
    await page.getByRole('combobox', { name: 'Elevations in' }).selectOption('ft');
    await page.locator('brim-host [part=job]').first().waitFor({ state: 'detached' });
    await expect.poll(range).toBeLessThan(inMetres / 3);
    // The foot is 0.3048 m by definition; the figures shown end at the centimetre.
    expect(Math.abs((await range()) - 0.3048 * inMetres)).toBeLessThan(0.01);
  });
});

describe('the unit on the page', () => {
  it('is announced as missing, and the question is brought into view', async () => {
    const page = await pageWith(`<div style="height: 3000px"></div>${hostWith(unit)}`);
    const question = page.getByRole('group', { name: 'In which unit are the elevations?' });
    await question.waitFor();
    const said = page.getByText('In which unit are the elevations of olinda.tif?');
    await said.waitFor();
    const isHeard = await said.evaluate((at) => at.closest('[role=status], [aria-live=polite]') !== null);
    expect(isHeard).toBe(true);
    await expect
      .poll(() => question.evaluate((at) => at.getBoundingClientRect().top < window.innerHeight))
      .toBe(true);
  });

  it('is plain text where the file names it', async () => {
    const page = await pageWith(hostWith('<brim-terrain src="town.tif"></brim-terrain>'));
    const facts = page.locator('brim-terrain dl');
    await facts.waitFor();
    expect(await facts.textContent()).toMatch(/Elevations in\s+metres/);
    expect(await page.getByRole('combobox', { name: 'Elevations in' }).count()).toBe(0);
  });
});

describe('least sizes', () => {
  const town = (attributes = '', host = 'map="townMap"'): string =>
    hostWith(
      `<brim-terrain src="town.tif"></brim-terrain><brim-pour-points ${attributes}></brim-pour-points>`,
      host,
    );

  it('stay as they are typed while the card is shown anew', async () => {
    const page = await pageWith(town());
    await page.locator('brim-pour-points .pond').first().waitFor();
    const area = page.getByRole('textbox', { name: 'area' });
    await area.pressSequentially('25');
    await page.locator('brim-pour-points .pond').first().dispatchEvent('click');
    await page.locator('brim-pour-points [part=detail]').waitFor();
    expect(await area.inputValue()).toBe('250');
  });

  it('take groups as the card prints them, and say at the field what they do not take', async () => {
    const page = await pageWith(town());
    await page.locator('brim-pour-points .pond').first().waitFor();
    const area = page.getByRole('textbox', { name: 'area' });
    const least = () => page.evaluate(() => document.querySelector('brim-pour-points')?.minArea);
    await area.fill('1,000');
    await area.press('Tab');
    await expect.poll(least).toBe(1000);
    await area.fill('1,5');
    await area.press('Tab');
    await page.getByRole('alert').filter({ hasText: '"1,5" is not a number' }).waitFor();
    expect(await area.getAttribute('aria-invalid')).toBe('true');
    expect(await area.inputValue()).toBe('1,5');
    expect(await least()).toBe(1000);
    expect(await violations(page)).toEqual([]);
    await area.fill('2');
    await area.press('Tab');
    await expect.poll(least).toBe(2);
    expect(await area.getAttribute('aria-invalid')).toBe('false');
  });

  it('that are no number in the attribute are refused in words, until they are', async () => {
    const page = await pageWith(town('min-depth="abc"'));
    await fault(page).filter({ hasText: 'The attribute min-depth is "abc"' }).waitFor();
    expect(await page.locator('brim-pour-points .pond').count()).toBe(0);
    await page.evaluate(() => document.querySelector('brim-pour-points')?.setAttribute('min-depth', '0.2'));
    await page.locator('brim-pour-points .pond').first().waitFor();
    expect(await fault(page).count()).toBe(0);
  });
});

describe('a place to trace from', () => {
  it('outside the terrain is told at the field, with an example that is inside', async () => {
    const page = await pageWith(
      hostWith('<brim-terrain src="town.tif"></brim-terrain><brim-spill-path></brim-spill-path>'),
    );
    const field = page.getByLabel('Or type a coordinate');
    await field.fill('1, 2');
    await field.press('Enter');
    const problem = page.getByRole('alert').filter({ hasText: 'The place 1, 2 lies outside the terrain' });
    await problem.waitFor();
    expect(await field.getAttribute('aria-invalid')).toBe('true');
    expect(await fault(page).count()).toBe(0);
    const example = /such as (\S+, \S+), x first/.exec((await problem.textContent()) ?? '')?.[1] ?? '';
    await field.fill(example);
    await field.press('Enter');
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    expect(await field.getAttribute('aria-invalid')).toBe('false');
  });

  it('is no longer picked after Escape, wherever the focus is', async () => {
    const page = await pageWith(
      hostWith('<brim-terrain src="town.tif"></brim-terrain><brim-spill-path></brim-spill-path>'),
    );
    await page.getByRole('button', { name: 'Pick on the map' }).click();
    const picking = () => page.evaluate(() => window.elementsStage.state().picking);
    expect(await picking()).toBe(true);
    await page.evaluate(() => {
      const map = document.getElementById('map');
      if (map) map.tabIndex = 0;
      map?.focus();
    });
    await page.keyboard.press('Escape');
    expect(await picking()).toBe(false);
  });
});

describe('a first load that is cancelled', () => {
  it('says that nothing is there yet, and can be asked for again', async () => {
    const page = await pageWith('');
    let isSlow = true;
    await page.route('**/slow.tif', (route) => {
      if (!isSlow) return route.fulfill({ path: demoTown, contentType: 'image/tiff' });
    });
    await page.evaluate((html) => {
      document.querySelector('main')?.insertAdjacentHTML('beforeend', html);
    }, hostWith('<brim-terrain src="slow.tif"></brim-terrain>'));
    await page.getByRole('button', { name: 'Cancel: Surveying the terrain' }).click();
    await page.getByText('Nothing was there before, so nothing is shown yet.').waitFor();
    isSlow = false;
    await page.getByRole('button', { name: 'Load slow.tif again' }).click();
    await page.locator('brim-terrain dl').waitFor();
    expect(await page.getByRole('button', { name: 'Load slow.tif again' }).count()).toBe(0);
  });
});

describe('files', () => {
  it('are taken from the chooser, several as one mosaic in the order of their names', async () => {
    const page = await pageWith(hostWith('<brim-terrain></brim-terrain>'));
    await page.locator('brim-terrain input[type=file]').setInputFiles(demoTown);
    const facts = page.locator('brim-terrain dl');
    await facts.waitFor();
    expect(await facts.textContent()).toContain('2,000 × 2,000 cells');
    await page.locator('brim-terrain input[type=file]').setInputFiles([
      { name: 'b.tif', mimeType: 'image/tiff', buffer: readFileSync(demoTown) },
      { name: 'a.tif', mimeType: 'image/tiff', buffer: readFileSync(demoTown) },
    ]);
    await facts.filter({ hasText: 'a.tif, b.tif' }).waitFor();
  });

  it('are taken where they are dropped', async () => {
    const page = await pageWith(hostWith('<brim-terrain></brim-terrain>'));
    await page.evaluate(async () => {
      const bytes = await (await fetch('town.tif')).arrayBuffer();
      const dataTransfer = new DataTransfer();
      dataTransfer.items.add(new File([bytes], 'dropped.tif'));
      const drop = document.querySelector('brim-terrain')?.shadowRoot?.querySelector('.drop');
      drop?.dispatchEvent(new DragEvent('drop', { dataTransfer, bubbles: true, cancelable: true }));
    });
    await page.locator('brim-terrain dl', { hasText: 'dropped.tif' }).waitFor();
  });

  it('that are no elevation are told by name, and the terrain that was there stays', async () => {
    const page = await pageWith(
      hostWith(
        '<brim-terrain vertical-unit="m" src="olinda.tif"></brim-terrain><brim-pour-points></brim-pour-points>',
      ),
    );
    await page.locator('brim-pour-points .pond').first().waitFor();
    await page.evaluate(() => document.querySelector('brim-terrain')?.setAttribute('src', 'broken.tif'));
    await fault(page).waitFor();
    expect(await fault(page).textContent()).toMatch(/broken\.tif.*TIFF/);
    expect(await page.locator('brim-terrain dl').textContent()).toContain('olinda.tif');
    expect(await page.locator('brim-pour-points .pond').count()).toBeGreaterThan(0);
    await page.getByRole('button', { name: 'Close this message' }).click();
    expect(await fault(page).count()).toBe(0);
  });

  it('that are not there are told with their address and the answer of the server', async () => {
    const page = await pageWith(hostWith('<brim-terrain src="nowhere.tif"></brim-terrain>'));
    await fault(page).waitFor();
    expect(await fault(page).textContent()).toMatch(/nowhere\.tif.*404/);
  });

  it('in trouble are told to the page, which may show that elsewhere', async () => {
    const page = await pageWith('');
    await page.evaluate(
      (html) => {
        addEventListener('brim-error', (event) => {
          document.title = event instanceof Event ? String(Reflect.get(event, 'code')) : '';
          event.preventDefault();
        });
        document.body.innerHTML = html;
      },
      hostWith('<brim-terrain src="broken.tif"></brim-terrain>', ''),
    );
    await expect.poll(() => page.title()).toBe('unreadable');
    expect(await fault(page).count()).toBe(0);
  });
});

describe('the map', () => {
  it.each([
    ['', 'No map is bound.'],
    ['map="noSuchMap"', 'no global variable "noSuchMap"'],
    ['for="nobody"', 'the element with the id "nobody" is missing'],
  ])('that is missing by <brim-host %s> is told with what to do', async (attributes, sentence) => {
    const page = await pageWith(hostWith('', attributes));
    await fault(page).waitFor();
    expect(await fault(page).textContent()).toContain(sentence);
    expect(await fault(page).textContent()).toMatch(/[Ss]et the property map/);
  });

  it('that comes after its absence was told is bound, and the message goes', async () => {
    const page = await pageWith(hostWith('', 'map="tardy"'));
    await fault(page).waitFor();
    await page.evaluate(() => Object.assign(window, { tardy: window.townMap }));
    await fault(page).waitFor({ state: 'detached' });
    expect(await page.evaluate(() => window.elementsStage.state().map === window.townMap)).toBe(true);
  });

  it('may come later than the host, by name or from an element', async () => {
    const page = await pageWith(hostWith('', 'map="later"') + hostWith('', 'for="map"'));
    const isBound = (): Promise<boolean[]> =>
      page.evaluate(() =>
        [...document.querySelectorAll('brim-host')].map(({ session }) => session.state.map !== null),
      );
    expect(await isBound()).toEqual([false, false]);
    await page.evaluate(() => {
      Object.assign(window, { later: window.townMap });
      const element = document.getElementById('map');
      if (element) Object.assign(element, { map: window.townMap });
    });
    await expect.poll(isBound).toEqual([true, true]);
    expect(await page.locator('[part=fault]').count()).toBe(0);
  });

  it('of another copy of OpenLayers is refused with what to do', async () => {
    const page = await pageWith(hostWith(''));
    await page.evaluate(() => {
      const host = document.querySelector('brim-host');
      if (host) host.map = { addLayer() {}, getView() {}, getTargetElement() {} };
    });
    await fault(page).waitFor();
    expect(await fault(page).textContent()).toContain('another copy of OpenLayers');
    expect(await fault(page).textContent()).toContain('load OpenLayers once');
  });

  it('is left as it was when the host goes', async () => {
    const page = await pageWith(hostWith(''));
    const layers = (): Promise<number> => page.evaluate(() => window.townMap.getLayers().getLength());
    await expect.poll(layers).toBe(1);
    await page.evaluate(() => document.querySelector('brim-host')?.remove());
    expect(await layers()).toBe(0);
  });
});

describe('a host', () => {
  it('that is missing is told by each element', async () => {
    const names = ['brim-terrain', 'brim-pour-points', 'brim-spill-path', 'brim-legend'];
    const page = await pageWith(names.map((name) => `<${name}></${name}>`).join(''));
    for (const name of names) {
      await page.locator(name, { hasText: 'This element has no host. Put it inside <brim-host>' }).waitFor();
    }
  });

  it('that comes to the page later, or is named later, serves an element elsewhere', async () => {
    const page = await pageWith('<brim-legend host="late"></brim-legend>');
    const legend = page.locator('brim-legend');
    await legend.filter({ hasText: 'has no host' }).waitFor();
    await page.evaluate(
      (html) => document.querySelector('main')?.insertAdjacentHTML('beforeend', html),
      hostWith('', 'id="late"'),
    );
    await legend.filter({ hasText: 'Choose a terrain first' }).waitFor();
    await page.evaluate(() => document.querySelector('brim-legend')?.setAttribute('host', 'other'));
    await legend.filter({ hasText: 'has no host' }).waitFor();
    await page.evaluate(() => document.querySelector('brim-legend')?.setAttribute('host', 'late'));
    await legend.filter({ hasText: 'Choose a terrain first' }).waitFor();
  });

  it('that is replaced hands an element elsewhere to the new one, and one that goes leaves it', async () => {
    const page = await pageWith(
      `${hostWith('', 'id="one" lang="en"')}<brim-legend host="one"></brim-legend>`,
    );
    const first = page.locator('brim-legend', { hasText: 'Choose a terrain first' });
    await first.waitFor();
    await page.evaluate(
      (html) => {
        const next = document.createRange().createContextualFragment(html);
        document.getElementById('one')?.replaceWith(next);
      },
      hostWith('<brim-terrain src="olinda.tif" vertical-unit="m"></brim-terrain>', 'id="one" map="townMap"'),
    );
    await page.locator('brim-legend', { hasText: 'Water, brimful' }).waitFor();
    await page.evaluate(() => document.getElementById('one')?.remove());
    await page.locator('brim-legend', { hasText: 'has no host' }).waitFor();
  });

  it('that goes ends its worker; one that is only moved keeps it, its terrain and the selection', async () => {
    const page = await pageWith(hostWith(unit.replace('src=', 'vertical-unit="m" src=')));
    await page.locator('brim-pour-points .pond').first().click();
    await page.locator('brim-pour-points [part=detail]').waitFor();
    const moved = await page.evaluate(async () => {
      const { surveyed, ponds, selected, layers } = window.elementsStage.state();
      const host = document.querySelector('brim-host');
      if (host) document.body.append(host);
      await new Promise((done) => setTimeout(done, 100));
      const now = window.elementsStage.state();
      const jobs = host?.session.running.jobs.length;
      const same = now.surveyed === surveyed && now.ponds === ponds && now.layers === layers;
      return { same, jobs, selected: selected !== null && now.selected === selected };
    });
    expect(moved).toEqual({ same: true, jobs: 0, selected: true });
    expect(page.workers().length).toBe(1);
    await page.evaluate(() => document.querySelector('brim-host')?.remove());
    await expect.poll(() => page.workers().length).toBe(0);
  });

  it('tells what runs, for how long, and cancels at once; a terrain that was there stays', async () => {
    const page = await pageWith(hostWith(unit.replace('src=', 'vertical-unit="m" src=')));
    await page.locator('brim-pour-points .pond').first().waitFor();
    // From now on an engine that never ends.
    await page.evaluate(() => {
      const host = document.querySelector('brim-host');
      if (!host) return;
      const { running } = host.session;
      const real = running.ask.bind(running);
      running.ask = (kind, start) =>
        real(kind, (engine, tell) => {
          const progress = {
            status: 'running',
            percent: 40,
            doing: 'surveying',
            elapsedMs: 2000,
            expectedMs: 60_000,
          } as const;
          setTimeout(() => tell(progress));
          const queued: ReturnType<typeof start> = {
            id: 1,
            title: '',
            progress,
            result: new Promise(() => {}),
            dismiss() {},
          };
          return engine ? queued : start(engine, tell);
        });
    });
    await page.evaluate(() => document.querySelector('brim-terrain')?.setAttribute('src', 'town.tif'));
    const job = page.locator('brim-host [part=job]');
    await job.filter({ hasText: 'Surveying the terrain: surveying' }).waitFor();
    await job.filter({ hasText: 'of about 1 min 0 s' }).waitFor();
    expect(await page.getByRole('progressbar', { name: 'Surveying the terrain' }).getAttribute('value')).toBe(
      '40',
    );
    expect(await violations(page)).toEqual([]);
    const waitedMs = await page.evaluate(async () => {
      const host = document.querySelector('brim-host');
      const since = performance.now();
      const cancel = host?.shadowRoot?.querySelector<HTMLElement>('[part=job] button');
      cancel?.click();
      await host?.updateComplete;
      return host?.shadowRoot?.querySelector('[part=job]') === null ? performance.now() - since : null;
    });
    expect(waitedMs).not.toBe(null);
    await page
      .locator('brim-host [part=said]', { hasText: 'Surveying the terrain was cancelled.' })
      .waitFor();
    expect(await page.locator('brim-terrain dl').textContent()).toContain('olinda.tif');
    expect(await page.locator('brim-pour-points .pond').count()).toBeGreaterThan(0);
  });

  it('speaks with the numbers of the page’s language', async () => {
    const page = await pageWith(
      hostWith('<brim-terrain src="town.tif"></brim-terrain>', 'map="townMap" lang="de"'),
    );
    await page.locator('brim-terrain dl', { hasText: '2.000 × 2.000' }).waitFor();
  });
});
