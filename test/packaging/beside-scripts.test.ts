import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join, resolve } from 'node:path';
import { Validator } from '@cfworker/json-schema';
import { expect, test } from 'vitest';
import { crsFromEpsg } from '../../src/raster/crs.ts';
import type { EpsgEntry } from '../../src/raster/epsg.ts';

const root = resolve(import.meta.dirname, '../..');
const bytes = (file: string): Buffer => readFileSync(join(root, file));
const json = (file: string) => JSON.parse(bytes(file).toString('utf8'));

// W3C Subresource Integrity, section 3.1: algorithm, a hyphen, the digest in base64.
test('each script and what lies beside it has its hash listed', () => {
  const files = readdirSync(join(root, 'dist')).filter((file) => /^overbrim.*\.(js|json)$/.test(file));
  const digests = files.map((file) => [
    file,
    `sha384-${createHash('sha384')
      .update(bytes(`dist/${file}`))
      .digest('base64')}`,
  ]);
  expect(files).toContain('overbrim.js');
  expect(json('dist/hashes.json')).toEqual(Object.fromEntries(digests));
});

test('the register of CRS codes gives what the package of all codes gives', async () => {
  const register: Record<string, EpsgEntry> = json('dist/overbrim-epsg.json');
  const all: Record<string, EpsgEntry> = createRequire(import.meta.url)('epsg-index/all.json');
  const kinds = ['CRS-PROJCRS', 'CRS-GEOGCRS', 'CRS-GEOG3DCRS', 'CRS-VERTCRS'];
  const inUse = Object.values(all).filter(({ kind }) => kinds.includes(kind));
  expect(Object.keys(register).sort()).toEqual(inUse.map(({ code }) => code).sort());
  for (const code of [32710, 4326, 27700, 2263, 31983]) {
    expect(await crsFromEpsg(code, async (asked) => register[asked] ?? null)).toEqual(
      await crsFromEpsg(code),
    );
  }
  expect(register[5703]).toMatchObject({ name: 'NAVD88 height', wkt: all[5703].wkt });
});

test('custom-elements.json tells the attributes and events that pages may use, and no more', () => {
  const { modules } = json('dist/custom-elements.json');
  const elements = modules
    .flatMap(({ declarations }: { declarations?: Record<string, unknown>[] }) => declarations ?? [])
    .filter(({ tagName }: Record<string, unknown>) => tagName !== undefined);
  const names = (list: unknown): string[] => ((list ?? []) as { name: string }[]).map(({ name }) => name);
  const told = Object.fromEntries(
    elements.map(({ tagName, attributes, events }: Record<string, unknown>) => [
      tagName,
      { attributes: names(attributes).sort(), events: names(events).sort() },
    ]),
  );
  expect(told).toEqual({
    'brim-host': {
      attributes: ['for', 'lang', 'map', 'units', 'without-caution', 'worker-url'],
      events: ['brim-error'],
    },
    'brim-legend': { attributes: ['host'], events: [] },
    'brim-pour-points': {
      attributes: ['host', 'min-area', 'min-capacity', 'min-depth'],
      events: ['brim-ponds', 'brim-select'],
    },
    'brim-spill-path': { attributes: ['host'], events: ['brim-path'] },
    'brim-terrain': {
      attributes: ['edges', 'host', 'neighbours', 'src', 'vertical-unit', 'voids', 'without-fit'],
      events: ['brim-terrain'],
    },
  });
  expect(JSON.stringify(elements)).not.toContain('"#');
});

test.each(['overbrim.js', 'overbrim-worker.js'])('%s shows its letters on a page of any encoding', (file) => {
  expect(/[\u0080-\uffff]/.test(readFileSync(join(root, 'dist', file), 'utf8'))).toBe(false);
});

// The schema that the Custom Elements Manifest publishes: see test/data/custom-elements-manifest/README.md.
test('custom-elements.json keeps to its published schema and names what is shipped', () => {
  const manifest = json('dist/custom-elements.json');
  const schema = json('test/data/custom-elements-manifest/schema.json');
  expect(new Validator(schema, '7', false).validate(manifest).errors).toEqual([]);
  const broken = { ...manifest, modules: [{ kind: 'javascript-module' }] };
  expect(new Validator(schema, '7', false).validate(broken).valid).toBe(false);
  const defined = manifest.modules.flatMap(
    ({ path, exports }: { path: string; exports: { kind: string; name: string }[] }) =>
      exports
        .filter(({ kind }) => kind === 'custom-element-definition')
        .map(({ name }) => [name, path.replaceAll(`${name}.component`, name)]),
  );
  const { sideEffects } = json('package.json');
  expect(Object.keys(Object.fromEntries(defined))).toContain('brim-host');
  for (const [name] of defined) expect(sideEffects).toContain(`./dist/elements/${name}.js`);
});
