import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { type Installed, installed } from './installed.ts';

let user: Installed;
beforeAll(() => {
  user = installed(({ dependencies }) => [...Object.keys(dependencies), 'ol']);
});
afterAll(() => user?.remove());

/** Plain scripts are loaded by a tag or as a worker, not imported. */
const isScript = (file: string): boolean => /^dist\/overbrim[^/]*\.js$/.test(file);

describe('what is shipped', () => {
  test('is the build, the licence and the words for people, and nothing else', () => {
    const others = user.files.filter((file) => !/^dist\/.+\.(js|js\.map|d\.ts)$/.test(file));
    expect(others.sort()).toEqual([
      'CHANGELOG.md',
      'DEVELOPERS.md',
      'LICENSE',
      'README.md',
      'dist/custom-elements.json',
      'dist/hashes.json',
      'dist/licences.txt',
      'dist/overbrim-epsg.json',
      'package.json',
      'src/processes/depressions.md',
      'src/processes/spill-path.md',
      'styles/tokens.css',
    ]);
  });

  test('has a declaration for each module, and imports only files that are there', () => {
    const modules = user.files.filter((file) => file.endsWith('.js') && !isScript(file));
    expect(modules.length).toBeGreaterThan(50);
    for (const file of modules) expect(user.files).toContain(file.replace(/\.js$/, '.d.ts'));
    let imports = 0;
    for (const file of user.files.filter((name) => /\.(js|d\.ts)$/.test(name) && !isScript(name))) {
      const text = readFileSync(join(user.packageFolder, file), 'utf8');
      for (const [, , target = ''] of text.matchAll(/(from|import) ?\(?['"](\.[^'"]+)['"]/g)) {
        expect(target, `in ${file}`).toMatch(/\.js$/);
        // A declaration speaks of a module that may have nothing but types, and so no code.
        const found = file.endsWith('.d.ts') ? target.replace(/\.js$/, '.d.ts') : target;
        expect(existsSync(join(user.packageFolder, file, '..', found)), `${found} of ${file}`).toBe(true);
        imports++;
      }
    }
    expect(imports).toBeGreaterThan(100);
  });
});

describe('a program that installed the package', () => {
  test('can import each entry, and finds names there', () => {
    const entries = Object.keys(user.manifest.exports).filter(
      (entry) => !/\.js(on)?$|^\.\/styles\//.test(entry),
    );
    const rooms = ['core', 'raster', 'host', 'processes', 'engine', 'map', 'elements', 'node'];
    expect(entries).toEqual(['.', ...rooms.map((room) => `./${room}`)]);
    for (const entry of entries) {
      const name = `overbrim${entry.slice(1)}`;
      const script = `import * as names from '${name}'; console.log(Object.keys(names).length)`;
      const { stdout, stderr } = user.node('--input-type=module', '--eval', script);
      expect(stderr, name).toBe('');
      expect(Number(stdout), name).toBeGreaterThan(0);
    }
  });

  test('can import each element, by class and by definition, where there is no page', () => {
    const elements = user.files.flatMap((file) => /^dist\/(elements\/brim-.+\.js)$/.exec(file)?.[1] ?? []);
    expect(elements.length).toBeGreaterThanOrEqual(10);
    expect(elements.length % 2).toBe(0);
    for (const element of elements) {
      const script = `import * as names from 'overbrim/${element}'; console.log(Object.keys(names).length)`;
      const { stdout, stderr } = user.node('--input-type=module', '--eval', script);
      expect(stderr, element).toBe('');
      expect(Number(stdout), element).toBeGreaterThan(0);
    }
  });

  test('finds each file that a page may want by its name', () => {
    const files = Object.entries(user.manifest.exports).filter(
      ([, target]) => typeof target === 'string' && !target.includes('*'),
    );
    expect(files.length).toBeGreaterThan(5);
    for (const [, target] of files) expect(existsSync(join(user.packageFolder, String(target)))).toBe(true);
  });

  test('keeps what defines elements, and only that, for its effect', () => {
    const defining = user.files.filter(
      (file) => /^dist\/elements\/(brim-.+|index)\.js$/.test(file) && !file.endsWith('.component.js'),
    );
    const others = [
      './dist/node/bin.js',
      './dist/engine/worker.js',
      './dist/script.js',
      './dist/overbrim*.js',
    ];
    const expected = [...others, ...defining.map((file) => `./${file}`)];
    expect([...user.manifest.sideEffects].sort()).toEqual(expected.sort());
  });

  test('finds a CRS by its EPSG code', () => {
    const script =
      "import { crsFromEpsg } from 'overbrim/raster'; console.log((await crsFromEpsg(32710)).name)";
    const { stdout } = user.node('--input-type=module', '--eval', script);
    expect(stdout.trim()).toBe('WGS 84 / UTM zone 10S');
  });

  test('can run the command', () => {
    const command = join(user.packageFolder, user.manifest.bin.overbrim ?? '');
    expect(readFileSync(command, 'utf8')).toMatch(/^#!\/usr\/bin\/env node\n/);
    const version = user.node(command, '--version');
    expect(version).toMatchObject({ status: 0, stdout: `${user.manifest.version}\n`, stderr: '' });
    const list = user.node(command, 'list');
    expect(list).toMatchObject({ status: 0, stderr: '' });
    expect(list.stdout).toMatch(/^depressions .*\nspill-path /);
  });

  test('shares one error class between the entries', () => {
    const script = `
      import { OverbrimError } from 'overbrim';
      import { gridOf, projectedMetrics } from 'overbrim/core';
      try { gridOf(2, 2, new Float32Array(3), projectedMetrics(2, 1, 1)); }
      catch (error) { console.log(error instanceof OverbrimError, error.code); }`;
    const { stdout, stderr } = user.node('--input-type=module', '--eval', script);
    expect({ stdout, stderr }).toEqual({ stdout: 'true bad-input\n', stderr: '' });
  });
});

describe('the analysis alone', () => {
  test('needs no other package', () => {
    const alone = installed(() => []);
    try {
      const script = `
        import { brimLevels, drainageOf, gridOf, outletSills, projectedMetrics, surveyOf, usualOutlets } from 'overbrim/core';
        const z = Float32Array.of(2, 2, 2, 2,  2, 0, 0, 1,  2, 2, 2, 2);
        const grid = gridOf(4, 3, z, projectedMetrics(3, 1, 1));
        const survey = surveyOf(grid);
        const levels = brimLevels(grid, survey, drainageOf(survey, outletSills(grid, survey, usualOutlets)));
        console.log([...levels].join());`;
      const { stdout, stderr } = alone.node('--input-type=module', '--eval', script);
      expect({ stdout, stderr }).toEqual({ stdout: '2,2,2,2,2,1,1,1,2,2,2,2\n', stderr: '' });
    } finally {
      alone.remove();
    }
  });
});
