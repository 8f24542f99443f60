import { build, createLogger } from 'vite';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { type Installed, installed } from './installed.ts';

let user: Installed;
beforeAll(() => {
  user = installed(({ dependencies }) => [...Object.keys(dependencies), 'ol']);
});
afterAll(() => user?.remove());

/** Bundles a page's script as a general-purpose bundler does it, with what the bundler warned of. */
async function bundled(script: string): Promise<{ code: string; warnings: string[] }> {
  const warnings: string[] = [];
  const logger = createLogger('silent');
  logger.warn = (message) => warnings.push(message);
  logger.warnOnce = logger.warn;
  const output = await build({
    root: user.folder,
    configFile: false,
    logLevel: 'silent',
    customLogger: logger,
    build: { write: false, minify: false, rolldownOptions: { input: user.write('page.js', script) } },
  });
  if (!('output' in output))
    throw new Error('The bundler gave several builds or a watcher, one was expected.');
  return { code: output.output.map((file) => ('code' in file ? file.code : '')).join('\n'), warnings };
}

/** Not a matcher on the text, which would print a whole bundle when it fails. */
function mentions(code: string, what: RegExp): boolean {
  return what.test(code);
}

test('a page can bundle everything but the Node entry, with nothing of Node in it', async () => {
  const rooms = ['core', 'raster', 'host', 'processes', 'engine', 'map', 'elements'];
  const entries = ['overbrim', ...rooms.map((room) => `overbrim/${room}`)];
  const script = entries.map((entry, i) => `import * as names${i} from '${entry}';\nconsole.log(names${i});`);
  const { code, warnings } = await bundled(script.join('\n'));
  expect(warnings).toEqual([]);
  expect(mentions(code, /OverbrimError/)).toBe(true);
  expect(mentions(code, /["']node:|__vite-browser-external/)).toBe(false);
});

test('what is imported and not used leaves nothing in the bundle', async () => {
  const { code } = await bundled(
    `import { gridOf } from 'overbrim/core';\nimport 'overbrim';\nconsole.log(1);`,
  );
  expect(mentions(code, /console\.log\(1\)/)).toBe(true);
  expect(mentions(code, /OverbrimError/)).toBe(false);
});

test('an element that is imported for its effect stays, and brings no other', async () => {
  const { code, warnings } = await bundled(`import 'overbrim/elements/brim-legend.js';`);
  expect(warnings).toEqual([]);
  expect(mentions(code, /\bBrimLegend\b/)).toBe(true);
  expect(mentions(code, /\bBrimTerrain\b/)).toBe(false);
});

test('a class that is imported and not used leaves nothing', async () => {
  const script = `import { BrimLegend } from 'overbrim/elements/brim-legend.component.js';\nconsole.log(1);`;
  const { code } = await bundled(script);
  expect(mentions(code, /BrimLegend/)).toBe(false);
});
