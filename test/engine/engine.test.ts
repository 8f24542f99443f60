import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Engine } from '../../src/engine/engine.ts';
import { type JobProgress, software } from '../../src/host/index.ts';
import { epsgFiles } from '../../src/node/epsg-files.ts';
import { main } from '../../src/node/main.ts';

const path = new URL('../data/olinda_dem_utm25s.tif', import.meta.url).pathname;
const blob = new Blob([readFileSync(path)]);
const silent = (): void => {};
let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'engine-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

const terminal = {
  stdout: { write: silent },
  stderr: { write: silent } as unknown as NodeJS.WritableStream,
  on: silent,
  off: silent,
};

describe('Engine', () => {
  it('gives the same bytes as the command line', async () => {
    const engine = new Engine(software, epsgFiles);
    const terrain = [engine.lend('olinda.tif', blob)];
    const options = ['--terrain', path, '--vertical-unit', 'm'];
    const cases = [
      { id: 'depressions', inputs: { nested: true, minDepth: 1 }, args: ['--nested', '--min-depth', '1'] },
      { id: 'spill-path', inputs: { from: '295000,9115000' }, args: ['--from', '295000,9115000'] },
    ];
    for (const [i, { id, inputs, args }] of cases.entries()) {
      const answer = await engine.run(i, id, { terrain, verticalUnit: 'm', ...inputs }, silent);
      if ('error' in answer) throw new Error(answer.error.message);
      const out = join(folder, id);
      expect(await main(['run', id, ...options, ...args, '--out', out], terminal)).toBe(0);
      const { outputs } = JSON.parse(readFileSync(join(out, 'result.json'), 'utf8'));
      expect(Object.keys(answer.value.outputs)).toEqual(
        outputs.map(({ output }: { output: string }) => output),
      );
      for (const { output, file, mediaType } of outputs) {
        const ours = answer.value.outputs[output];
        expect(ours.mediaType).toBe(mediaType);
        expect(Buffer.from(ours.bytes).equals(readFileSync(join(out, file))), file).toBe(true);
      }
    }
  });

  it('gives a view whose levels are those of the survey, with a name for each outermost pond', async () => {
    const engine = new Engine(software, epsgFiles);
    const terrain = [engine.lend('olinda.tif', blob)];
    const answer = await engine.view(1, { terrain, verticalUnit: 'm' }, silent);
    if ('error' in answer) throw new Error(answer.error.message);
    const { view } = answer.value;
    expect([view.width, view.height, view.voids, view.ponds.length]).toEqual([111, 111, 0, 312]);
    let wet = 0;
    view.elevationM.forEach((z, cell) => {
      const leaf = view.leaf[cell];
      if (z >= view.levelM[leaf]) return;
      wet++;
      expect(view.pondOfLeaf[leaf]).toBeGreaterThanOrEqual(0);
    });
    expect(wet).toBe(1221);
    expect(new Set(view.ponds).size).toBe(312);
  });

  it('answers with a code and a sentence instead of throwing', async () => {
    const engine = new Engine(software, epsgFiles);
    const terrain = [engine.lend('olinda.tif', blob)];
    expect(await engine.run(1, 'depressions', { terrain }, silent)).toMatchObject({
      error: { code: 'unit-missing', message: /--vertical-unit m\|ft\|us-ft/ },
    });
    expect(await engine.run(2, 'nothing', {}, silent)).toMatchObject({
      error: {
        code: 'bad-input',
        message: 'There is no process "nothing"; expected one of depressions, spill-path.',
      },
    });
    expect(
      await engine.run(3, 'depressions', { terrain: ['lent:9/gone.tif'], verticalUnit: 'm' }, silent),
    ).toMatchObject({
      error: {
        code: 'unreadable',
        message: 'The file behind lent:9/gone.tif is not here any more; choose it again.',
      },
    });
  });

  it('keeps the terrain when a job is dismissed, and answers the next question', async () => {
    const engine = new Engine(software, epsgFiles);
    const terrain = [engine.lend('olinda.tif', blob)];
    const inputs = { terrain, verticalUnit: 'm' };
    const dismissed = engine.run(1, 'depressions', inputs, ({ doing }: JobProgress) => {
      if (doing === 'surveying catchments') engine.dismiss(1);
    });
    expect(await dismissed).toMatchObject({ error: { code: 'cancelled' } });
    const told: string[] = [];
    const answer = await engine.run(2, 'depressions', inputs, ({ doing }) => told.push(doing));
    expect('value' in answer).toBe(true);
    expect(told).not.toContain('reading elevation');
  });
});
