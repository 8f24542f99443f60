import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { twinPits, twoPonds } from '../processes/small-terrains.ts';
import { overbrim } from './fake-terminal.ts';
import { WorkFolder } from './work-folder.ts';

const work = new WorkFolder();
const two = await work.terrain('two.tif', twoPonds);

interface Summary {
  readonly [name: string]: unknown;
  readonly result: Record<string, unknown>;
  readonly out: string;
}

describe('options of a process', () => {
  let runs = 0;
  const summaryWith = async (...args: string[]): Promise<Summary> => {
    const out = `options-${runs++}`;
    const { code, err } = await overbrim('run', 'depressions', '--out', work.at(out), ...args);
    expect(err).not.toContain('overbrim:');
    expect(code).toBe(0);
    return { ...work.json(out, 'summary.json'), result: work.json(out, 'result.json'), out };
  };

  it('are also given by their names with --input', async () => {
    const terrain = await work.terrain('twins.tif', twinPits);
    const plain = await summaryWith(
      '--terrain',
      terrain,
      '--nested',
      '--min-depth',
      '4.5',
      '--neighbours',
      '4',
    );
    const named = await summaryWith(
      ...['--input', `terrain=${terrain}`, 'nested=true', 'minDepth=4.5', '--input', 'neighbours=4'],
    );
    expect(named.result.inputs).toEqual(plain.result.inputs);
    expect(plain.result.inputs).toMatchObject({ nested: true, minDepth: 4.5, neighbours: 4 });
    expect(readFileSync(work.at(named.out, 'ponds.geojson'), 'utf8')).toBe(
      readFileSync(work.at(plain.out, 'ponds.geojson'), 'utf8'),
    );
  });

  it('name outlets in every way', async () => {
    // 500025,985 is the pit of the upper pond; 3.000585,0.008912 lies in the pit of the lower one.
    expect(await summaryWith('--terrain', two, '--outlets', '500025,985')).toMatchObject({ ponds: 1 });
    expect(
      await summaryWith('--terrain', two, '--outlets', '3.000585,0.008912', '--crs', 'EPSG:4326'),
    ).toMatchObject({ ponds: 1 });
    expect(await summaryWith('--terrain', two, '--edges', 'closed', '--outlets', 'deepest')).toMatchObject({
      ponds: 2,
    });
    expect(await summaryWith('--terrain', two, '--outlets', '500025,985', '500065,985')).toMatchObject({
      ponds: 0,
    });
    expect(
      await summaryWith('--terrain', two, '--outlets', '500025,985', '--outlets', '500065,985'),
    ).toMatchObject({ ponds: 0 });
    const file = work.put(
      'pit.geojson',
      JSON.stringify({ type: 'Point', coordinates: [3.000225, 0.008912] }),
    );
    expect(await summaryWith('--terrain', two, '--outlets', file)).toMatchObject({ ponds: 1 });
  });

  it('take coordinates that start with a minus', async () => {
    const west = await work.terrain('west.tif', twoPonds, { epsg: 4326, west: -30, north: 1, cellSize: 1 });
    const { result, ...summary } = await summaryWith('--terrain', west, '--outlets', 'deepest', '-27.5,-.5');
    expect(summary).toMatchObject({ ponds: 1 });
    expect(result.inputs).toMatchObject({ outlets: ['deepest', '-27.5,-.5'] });
  });

  it('join several files to a mosaic, and open or close the gap between them', async () => {
    const basin = [
      [9, 9, 9],
      [9, 4, 4],
      [9, 9, 9],
    ];
    const left = await work.terrain('left.tif', basin);
    const mirrored = basin.map((row) => [...row].reverse());
    const right = await work.terrain('right.tif', mirrored, { west: 500_040 });
    const closed = await summaryWith('--terrain', left, right);
    expect(closed).toMatchObject({ width: 7, height: 3, voids: 3, ponds: 2, capacityM3: 2000 });
    expect(closed.result.notes).toEqual([
      expect.stringMatching(/^Between left\.tif and right\.tif lies a gap of 1 × 3 cells at column 3, row 0/),
    ]);
    expect(closed.result.facts).toMatchObject({
      terrain: { files: [{ name: 'left.tif' }, { name: 'right.tif' }] },
    });
    const repeated = await summaryWith('--terrain', left, '--terrain', right, '--gaps', 'open');
    expect(repeated).toMatchObject({ width: 7, ponds: 0 });
  });

  it('say the unit of the elevations', async () => {
    const silent = await work.terrain('silent.tif', twoPonds, { verticalUnit: null });
    const feet = await summaryWith('--terrain', silent, '--vertical-unit', 'ft');
    expect(Number(feet.capacityM3)).toBeCloseTo(800 * 0.3048, 3);
    const surveyFeet = await summaryWith('--terrain', silent, '--vertical-unit', 'us-ft');
    expect(Number(surveyFeet.capacityM3) / Number(feet.capacityM3)).toBeCloseTo(1200 / 3937 / 0.3048, 6);
  });
});
