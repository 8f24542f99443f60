import { execFileSync } from 'node:child_process';
import { resolve } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { type Installed, installed } from './installed.ts';

/** Types that a user of the Node entry has; the others must do without. */
const nodeTypes = ['@types/node', 'undici-types'];

let user: Installed;
beforeAll(() => {
  user = installed(({ dependencies }) => [...Object.keys(dependencies), 'ol', ...nodeTypes]);
});
afterAll(() => user?.remove());

/** What the compiler says about a user's program, strictest settings, library files checked too. */
function complaints(
  entries: readonly string[],
  lib: readonly string[],
  types: readonly string[],
  extra = '',
) {
  const imports = entries.map((entry, i) => `import * as names${i} from '${entry}';\nvoid names${i};\n`);
  user.write('program.ts', imports.join('') + extra);
  const compilerOptions = { strict: true, noEmit: true, target: 'ES2022', module: 'NodeNext', lib, types };
  const config = user.write('tsconfig.json', JSON.stringify({ compilerOptions, files: ['program.ts'] }));
  const compiler = resolve(import.meta.dirname, '../../node_modules/typescript/bin/tsc');
  try {
    return execFileSync(process.execPath, [compiler, '--project', config], { encoding: 'utf8' });
  } catch (error) {
    return (error as { stdout: string }).stdout;
  }
}

test('the analysis has types for a program without page or Node', () => {
  expect(complaints(['overbrim/core'], ['ES2022'], [])).toBe('');
});

test('everything but the Node entry has types for a page', () => {
  const entries = ['overbrim', 'overbrim/core', 'overbrim/raster', 'overbrim/host', 'overbrim/processes'];
  expect(complaints(entries, ['ES2022', 'DOM', 'DOM.Iterable'], [])).toBe('');
});

test('map, engine and elements have types for a page with OpenLayers', () => {
  const entries = ['overbrim/engine', 'overbrim/map', 'overbrim/elements', 'overbrim/elements/brim-host.js'];
  const use = `const host: names3.BrimHost = document.createElement('brim-host');\nvoid host;\n`;
  expect(complaints(entries, ['ES2022', 'DOM', 'DOM.Iterable'], [], use)).toBe('');
});

test('the Node entry has types for a program on Node', () => {
  expect(complaints(['overbrim/node'], ['ES2022'], ['node'])).toBe('');
});

test('types are those of the package, not any', () => {
  const wrong = `import { gridOf, projectedMetrics } from 'overbrim/core';\ngridOf('2', 2, new Float32Array(4), projectedMetrics(2, 1, 1));\n`;
  expect(complaints([], ['ES2022'], [], wrong)).toMatch(/TS2345.*'string'.*'number'/);
});
