import { readFileSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Analysed, analysed } from './analysed.ts';
import { middle, noisyGround, start } from './noisy-ground.ts';
import { openBrowser, openStage, pageScript, serve } from './stage.ts';

let browser: Browser;
let scene: Analysed;

beforeAll(async () => {
  scene = await analysed(await noisyGround(), start);
  browser = await openBrowser();
});
afterAll(() => browser.close());

const near = { projection: 'EPSG:3857', rotationDeg: 0, cellsPerPixel: 0.7, center: middle } as const;

describe.each(['ol', 'ol7'] as const)('on the package %s', (ol) => {
  let site: Awaited<ReturnType<typeof serve>>;
  let page: Page;
  beforeAll(async () => {
    const other = readFileSync(`node_modules/${ol === 'ol' ? 'ol7' : 'ol'}/dist/ol.js`, 'utf8');
    site = await serve(scene, await pageScript(ol), { '/other-ol.js': other });
    page = await openStage(browser, site.url, { width: 440, height: 340, deviceScaleFactor: 1 });
  });
  afterAll(async () => {
    await page.close();
    await site.close();
  });

  it('reads ground, water and pond from the grid, in both projections and rotated', async () => {
    for (const projection of ['EPSG:3857', 'terrain'] as const) {
      await page.evaluate((wish) => window.stage.look(wish), { ...near, projection, rotationDeg: 30 });
      const found = await page.evaluate(() => window.stage.readBack(7));
      expect(found.asked).toBeGreaterThan(6000);
      expect(found.wet).toBeGreaterThan(300);
      expect(found.wrong).toBe(0);
    }
  });

  it('has all its layers in one group, and takes them off again', async () => {
    const found = await page.evaluate(() => {
      const { map, layers } = window.stage;
      const before = map.getLayers().getLength();
      const extra = new window.stage.SurveyLayers(map);
      const during = map.getLayers().getLength();
      extra.remove();
      return {
        before,
        during,
        after: map.getLayers().getLength(),
        inside: layers.group.getLayers().getLength(),
      };
    });
    expect(found).toEqual({ before: 1, during: 2, after: 1, inside: 7 });
  });

  it('paints other classes and levels without a frame of the map', async () => {
    await page.evaluate((wish) => window.stage.look(wish), near);
    const found = await page.evaluate(() => {
      const { map, layers, survey } = window.stage;
      const canvas = document.querySelector('.brim-wet canvas') as HTMLCanvasElement;
      const colours = (): Record<string, number> => {
        const { data } = (canvas.getContext('2d') as CanvasRenderingContext2D).getImageData(
          0,
          0,
          canvas.width,
          canvas.height,
        );
        const counts: Record<string, number> = {};
        for (const pixel of new Uint32Array(data.buffer)) counts[pixel] = (counts[pixel] ?? 0) + 1;
        return counts;
      };
      let frames = 0;
      map.on('postrender', () => frames++);
      layers.wet.setClasses([{ fromM: 0, colour: [0, 255, 0], label: 'wet' }]);
      const one = colours();
      layers.wet.setLevels(new Float32Array(survey.levelM.length).fill(Number.POSITIVE_INFINITY));
      const none = colours();
      const flood = new Float32Array(survey.levelM.length).fill(1e6);
      layers.wet.setLevels(flood);
      const all = colours();
      layers.wet.setLevels(undefined);
      const again = colours();
      return { frames, one, none, all, again };
    });
    const green = String(0xff00ff00);
    expect(found.frames).toBe(0);
    expect(found.one[green]).toBeGreaterThan(1000);
    expect(found.none[green]).toBeUndefined();
    expect(found.all[green]).toBeGreaterThan(found.one[green]);
    expect(found.again).toEqual(found.one);
  });

  it('gathers pooled cells again once levels have settled', async () => {
    await page.evaluate((wish) => window.stage.look(wish), { ...near, cellsPerPixel: 6 });
    const found = await page.evaluate(async () => {
      const { layers, survey, settled } = window.stage;
      const canvas = document.querySelector('.brim-wet canvas') as HTMLCanvasElement;
      const wet = (): number => {
        const context = canvas.getContext('2d') as CanvasRenderingContext2D;
        const { data } = context.getImageData(0, 0, canvas.width, canvas.height);
        return new Uint32Array(data.buffer).filter((pixel) => pixel !== 0).length;
      };
      const first = wet();
      layers.wet.setLevels(new Float32Array(survey.levelM.length).fill(Number.POSITIVE_INFINITY));
      await new Promise((done) => setTimeout(done, 300));
      await settled();
      const dry = wet();
      // Where all was dry a block stood for its lowest cell, which need not be the wet one.
      layers.wet.setLevels(undefined);
      const atOnce = wet();
      await new Promise((done) => setTimeout(done, 300));
      await settled();
      return { first, dry, atOnce, after: wet() };
    });
    expect(found.dry).toBe(0);
    expect(found.atOnce).toBeGreaterThan(0);
    expect(found.atOnce).toBeLessThan(found.first);
    expect(found.after).toBe(found.first);
  });

  it('takes half the resolution while a large view moves, and all of it afterwards', async () => {
    await page.setViewportSize({ width: 2000, height: 1400 });
    await page.evaluate((wish) => window.stage.look(wish), near);
    const widths = await page.evaluate(async () => {
      const { map, settled } = window.stage;
      const width = (): number => (document.querySelector('.brim-wet canvas') as HTMLCanvasElement).width;
      const still = width();
      map.getView().beginInteraction();
      map.renderSync();
      const moving = width();
      map.getView().endInteraction();
      await settled();
      return { still, moving, after: width() };
    });
    await page.setViewportSize({ width: 440, height: 340 });
    expect(widths.moving).toBe(Math.ceil(widths.still / 2));
    expect(widths.after).toBe(widths.still);
  });

  it('draws pour points, path and selection where they lie, and again in another projection', async () => {
    for (const projection of ['EPSG:3857', 'terrain'] as const) {
      await page.evaluate((wish) => window.stage.look(wish), { ...near, projection });
      const found = await page.evaluate(async () => {
        const { map, layers, scene: given, settled } = window.stage;
        layers.setPath(given.path);
        // A large one whose pour point is on the screen.
        const [width, height] = map.getSize() ?? [0, 0];
        const shown = [...layers.ponds.values()].find(({ pourPoint, reach }) => {
          const [x, y] = map.getPixelFromCoordinate([...(pourPoint ?? [0, 0])]);
          return x > 20 && y > 20 && x < width - 20 && y < height - 20 && reach > 100;
        });
        if (!shown?.pourPoint) throw new Error('no pond is in view');
        layers.select(shown.id);
        await settled();
        const at = map.getPixelFromCoordinate([...shown.pourPoint]);
        const hits = map.getFeaturesAtPixel(at, { layerFilter: (layer) => layer === layers.pourPoints });
        const legs = layers.path.getSource()?.getFeatures() ?? [];
        const selected = layers.selection.getSource()?.getFeatures() ?? [];
        layers.select(null);
        return {
          hit: hits.some((feature) => feature.get('pond') === shown.id),
          legs: legs.length === given.path.features.length,
          selected: selected.length,
          after: layers.selection.getSource()?.getFeatures().length,
        };
      });
      expect(found).toEqual({ hit: true, legs: true, selected: 2, after: 0 });
    }
  });

  it('applies opacity and extent of the layer', async () => {
    await page.evaluate((wish) => window.stage.look(wish), near);
    const style = await page.evaluate(async () => {
      const { map, layers, settled } = window.stage;
      layers.wet.setOpacity(0.5);
      layers.wet.setExtent(map.getView().calculateExtent([100, 60]));
      await settled();
      const { opacity, clipPath } = (document.querySelector('.brim-wet') as HTMLElement).style;
      layers.wet.setOpacity(1);
      layers.wet.setExtent(undefined);
      await settled();
      return { opacity, clipPath, size: map.getSize() ?? [] };
    });
    expect(style.opacity).toBe('0.5');
    const corners = [...style.clipPath.matchAll(/([-\d.]+)px ([-\d.]+)px/g)].map(([, x, y]) => [
      Number(x),
      Number(y),
    ]);
    const [x, y] = style.size.map((side) => side / 2);
    const expected = [
      [x - 50, y + 30],
      [x - 50, y - 30],
      [x + 50, y - 30],
      [x + 50, y + 30],
    ];
    corners.forEach((corner, at) => {
      expect(corner[0]).toBeCloseTo(expected[at][0], 1);
      expect(corner[1]).toBeCloseTo(expected[at][1], 1);
    });
    expect(corners.length).toBe(4);
  });

  it('refuses a map of another copy of OpenLayers in a sentence', async () => {
    // By hand, since the driver takes what the policy refuses to that script's workers for a failure to load.
    await page.evaluate(
      () =>
        new Promise((done) => {
          const script = document.createElement('script');
          script.src = 'other-ol.js';
          script.onload = done;
          document.head.append(script);
        }),
    );
    const said = await page.evaluate(() => {
      const { Map: OtherMap } = Reflect.get(window, 'ol');
      try {
        new window.stage.SurveyLayers(new OtherMap({}));
        return 'nothing';
      } catch (error) {
        return String(error);
      }
    });
    expect(said).toBe(
      'OverbrimError: The map was made by another copy of OpenLayers than the one that Overbrim found, and two copies cannot share layers; load OpenLayers once and make the map with that copy (by script tag the global "ol", in a bundle a single installed "ol").',
    );
  });
});
