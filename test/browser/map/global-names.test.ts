import { readdirSync, readFileSync } from 'node:fs';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { openBrowser } from './stage.ts';

let browser: Browser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());

/** What src/map runs of the map library, as names in the script-tag build: `ol.proj.get`, `ol.layer.Layer`, … */
function namesAsked(): string[] {
  const names = new Set<string>();
  for (const file of readdirSync('src/map')) {
    const text = readFileSync(`src/map/${file}`, 'utf8');
    for (const [, what, from] of text.matchAll(/^import (?!type )([^;]*?) from '(ol\/[^']+)\.js';/gm)) {
      const base = from.replaceAll('/', '.');
      const braced = /\{([^}]*)\}/.exec(what)?.[1];
      if (!what.startsWith('{')) names.add(base);
      for (const name of braced?.split(',').map((part) => part.trim()) ?? []) {
        if (name !== '' && !name.startsWith('type ')) names.add(`${base}.${name}`);
      }
    }
  }
  return [...names];
}

// The script-tag build of the map library leaves some modules out.
it.each(['ol7', 'ol'])('the script-tag build of %s has all that the layers need', async (ol) => {
  const asked = namesAsked();
  expect(asked).toContain('ol.layer.Layer');
  expect(asked).toContain('ol.proj.getTransform');
  const page = await browser.newPage();
  await page.addScriptTag({ path: `node_modules/${ol}/dist/ol.js` });
  const missing = await page.evaluate(
    (names) =>
      names.filter((name) => {
        let value: unknown = window;
        for (const part of name.split('.')) value = Reflect.get(Object(value), part);
        return typeof value !== 'function';
      }),
    asked,
  );
  await page.close();
  expect(missing).toEqual([]);
});
