import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { main } from '../../src/node/index.ts';
import { caution, depressions, spillPath } from '../../src/processes/index.ts';
import { plane, twoPonds } from '../processes/small-terrains.ts';
import { FakeTerminal, overbrim } from './fake-terminal.ts';
import { WorkFolder } from './work-folder.ts';

const work = new WorkFolder();
const two = await work.terrain('two.tif', twoPonds);

describe('overbrim', () => {
  it('prints help when nothing is asked, and the version', async () => {
    const help = await overbrim();
    expect(help).toMatchObject({ code: 0, err: '' });
    expect(help.out).toMatch(/^Usage: overbrim/);
    expect(help.out).toContain('run a process');
    expect(help.out.replace(/\s+/g, ' ')).toContain(caution);
    expect((await overbrim('--help')).out).toBe(help.out);
    const { version } = JSON.parse(readFileSync('package.json', 'utf8'));
    expect(await overbrim('--version')).toEqual({ code: 0, out: `${version}\n`, err: '' });
  });

  it('shows every option of a process in its help', async () => {
    const { code, out } = await overbrim('run', 'depressions', '--help');
    expect(code).toBe(0);
    for (const flag of ['terrain', 'out', 'input', 'json', 'edges', 'neighbours', 'voids', 'gaps', 'outlets'])
      expect(out).toContain(`--${flag}`);
    for (const flag of ['vertical-unit', 'min-depth', 'min-area', 'min-capacity', 'nested', 'crs'])
      expect(out).toContain(`--${flag}`);
    expect(out).not.toContain('--from');
    expect((await overbrim('run', 'spill-path', '--help')).out).toContain('--from <value>');
  });

  it('lists processes', async () => {
    expect(await overbrim('list')).toEqual({
      code: 0,
      out: 'depressions  Find ponds and where they overflow\nspill-path   Trace where water runs and overflows\n',
      err: '',
    });
    const { out } = await overbrim('list', '--json');
    expect(JSON.parse(out)).toEqual(
      [depressions, spillPath].map(({ description: { id, version, title } }) => ({ id, version, title })),
    );
  });

  it('describes a process as JSON and as text', async () => {
    for (const args of [[], ['--json']]) {
      const { code, out } = await overbrim('describe', 'spill-path', ...args);
      expect(code).toBe(0);
      expect(JSON.parse(out)).toEqual(spillPath.description);
    }
    const { code, out } = await overbrim('describe', 'depressions', '--text');
    expect(code).toBe(0);
    expect(out).toContain('depressions 1.0.0: Find ponds and where they overflow\n');
    expect(out).toContain('  --terrain (needed, several)\n      elevation file, or several as one mosaic\n');
    expect(out).toContain('  --min-depth (usually 0)\n');
    expect(out).toContain('  ponds (application/geo+json)\n');
  });
});

describe('overbrim run depressions', () => {
  it('writes the five files, tells their sizes and the summary, and exits with 0', async () => {
    const { code, out, err } = await overbrim(
      'run',
      'depressions',
      '--terrain',
      two,
      '--out',
      work.at('ponds'),
    );
    expect(code).toBe(0);
    const files = [
      'brim-level.tif',
      'pour-points.geojson',
      'ponds.geojson',
      'result.json',
      'summary.json',
    ].sort();
    expect(work.list().filter((path) => path.startsWith('ponds/'))).toEqual(
      files.map((file) => `ponds/${file}`),
    );
    expect(out).toContain(`Results are in ${work.at('ponds')}\n`);
    expect(out).toMatch(/^ {2}capacityM3 +800$/m);
    expect(out).toContain(caution);
    expect(err).toMatch(/^ {2}0 % reading elevation \(\d+\.\d s\)\n/);
    expect(err).toMatch(/100 % writing brim levels/);
    expect(work.json('ponds', 'summary.json')).toMatchObject({ ponds: 2, capacityM3: 800 });
  });

  it('records in result.json where everything comes from', async () => {
    const result = work.json('ponds', 'result.json');
    const sha256 = (path: string) => createHash('sha256').update(readFileSync(path)).digest('hex');
    expect(result).toMatchObject({
      process: { id: 'depressions', version: '1.0.0' },
      software: { name: 'overbrim' },
      inputs: {
        terrain: [two],
        edges: 'open',
        neighbours: 8,
        voids: 'rim',
        gaps: 'walls',
        minDepth: 0,
        nested: false,
      },
      facts: {
        terrain: {
          files: [{ name: 'two.tif', sha256: sha256(two) }],
          width: 10,
          height: 3,
          epsg: 32631,
          verticalUnit: 'm',
        },
      },
      notes: [],
      caution,
    });
    const outputs = result.outputs as {
      output: string;
      file: string;
      mediaType: string;
      bytes: number;
      sha256: string;
    }[];
    expect(outputs.map(({ output, file }) => [output, file])).toEqual([
      ['ponds', 'ponds.geojson'],
      ['pour-points', 'pour-points.geojson'],
      ['brim-level', 'brim-level.tif'],
      ['summary', 'summary.json'],
    ]);
    for (const { file, bytes, sha256: written } of outputs) {
      expect(written).toBe(sha256(work.at('ponds', file)));
      expect(bytes).toBe(readFileSync(work.at('ponds', file)).length);
    }
    expect(String(result.started) <= String(result.finished)).toBe(true);
  });

  it('gives the same bytes again, and replaces the results of an earlier run', async () => {
    const read = (file: string) => readFileSync(work.at('ponds', file));
    const names = ['ponds.geojson', 'pour-points.geojson', 'brim-level.tif', 'summary.json'];
    const before = names.map(read);
    work.put('ponds/notes.txt', 'by the analyst');
    await overbrim('run', 'depressions', '--terrain', two, '--out', work.at('ponds'), '--min-depth', '3.5');
    expect(work.json('ponds', 'ponds.geojson').features).toEqual([]);
    await overbrim('run', 'depressions', '--terrain', two, '--out', work.at('ponds'));
    expect(names.map(read)).toEqual(before);
    expect(readFileSync(work.at('ponds', 'notes.txt'), 'utf8')).toBe('by the analyst');
    expect(work.list().filter((path) => path.includes('partial'))).toEqual([]);
  });

  it('exits with 0 where there is no pond', async () => {
    const terrain = await work.terrain('plane.tif', plane);
    const { code } = await overbrim(
      'run',
      'depressions',
      '--terrain',
      terrain,
      '--out',
      work.at('dry', 'deep', 'down'),
    );
    expect(code).toBe(0);
    expect(work.json('dry', 'deep', 'down', 'ponds.geojson')).toEqual({
      type: 'FeatureCollection',
      features: [],
    });
  });

  it('reports as one JSON document with --json', async () => {
    const { code, out, err } = await overbrim(
      'run',
      'depressions',
      '--json',
      ...['--terrain', two, '--out', work.at('json')],
    );
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(JSON.parse(out)).toMatchObject({
      folder: work.at('json'),
      files: [{ file: 'ponds.geojson' }, {}, {}, {}],
      notes: [],
      values: { summary: { ponds: 2 } },
      caution,
    });
  });

  it('draws a bar on a terminal', async () => {
    const terminal = new FakeTerminal(true);
    expect(await main(['run', 'depressions', '--terrain', two, '--out', work.at('bar')], terminal)).toBe(0);
    expect(terminal.err).toContain('┄');
    expect(terminal.err).toContain('\u001B[?25h');
    expect(terminal.err).not.toContain('% reading elevation (');
    expect(terminal.listening).toBe(0);
  });
});

describe('overbrim run spill-path', () => {
  it('writes its three files', async () => {
    const { code, out } = await overbrim(
      ...['run', 'spill-path', '--terrain', two, '--out', work.at('path'), '--from', '500015,995'],
    );
    expect(code).toBe(0);
    expect(out).toContain('spill-path.geojson');
    expect(work.list().filter((path) => path.startsWith('path/'))).toEqual(
      ['long-section.json', 'result.json', 'spill-path.geojson'].map((file) => `path/${file}`),
    );
    expect(work.json('path', 'spill-path.geojson').features).toHaveLength(5);
    expect(work.json('path', 'result.json')).toMatchObject({
      process: { id: 'spill-path' },
      inputs: { from: '500015,995' },
    });
  });
});
