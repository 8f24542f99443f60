import { createHash } from 'node:crypto';
import { expect, it } from 'vitest';
import { TerrainShelf } from '../../src/engine/index.ts';
import { Job } from '../../src/host/index.ts';
import { epsgFiles } from '../../src/node/index.ts';
import { depressions } from '../../src/processes/index.ts';
import { memorySource } from '../../src/raster/byte-source.ts';
import { runInMemory, terrainFile } from './made-terrain.ts';
import { twoPonds } from './small-terrains.ts';

const terrain = await terrainFile(twoPonds);
/** A point on the made terrain near its origin, where a degree is about 111 km (check by hand, to a cell). */
const outletAt = (column: number, levelM?: number) =>
  JSON.stringify({
    type: 'Feature',
    properties: { levelM },
    geometry: { type: 'Point', coordinates: [3 + (column + 0.5) * 0.00009, 0.00891] },
  });
/** SHA-256 by Node's own hash. */
const sha256 = (text: string) => createHash('sha256').update(text).digest('hex');

it('lineage kept only the path of a file of outlets: it identifies each by name and SHA-256', async () => {
  const bom = `\uFEFF${outletAt(2)}`;
  const { lineage } = await runInMemory(
    depressions,
    { 'made.tif': terrain, 'a.geojson': bom, 'b.geojson': outletAt(6) },
    { outlets: ['voids', 'a.geojson', 'deepest', 'b.geojson', '500065,985'] },
  );
  expect(lineage.facts.textFiles).toEqual([
    { input: 'outlets', name: 'a.geojson', sha256: sha256(bom) },
    { input: 'outlets', name: 'b.geojson', sha256: sha256(outletAt(6)) },
  ]);
  const without = await runInMemory(depressions, { 'made.tif': terrain }, { outlets: ['deepest'] });
  expect(without.lineage.facts).not.toHaveProperty('textFiles');
});

it('a file of outlets that changed between two questions was answered as before: it is read again', async () => {
  const files: Record<string, Uint8Array | string> = { 'made.tif': terrain };
  const shelf = new TerrainShelf({
    source: async (reference) => memorySource(reference, Buffer.from(files[reference])),
    epsg: epsgFiles,
  });
  const ask = async (text: string) => {
    files['reach.geojson'] = text;
    const inputs = { terrain: ['made.tif'], outlets: ['reach.geojson'] };
    const job = new Job(depressions, inputs, shelf, { software: { name: 'test', version: '0' } });
    const { outputs, lineage } = await job.result;
    return { summary: outputs.summary, textFiles: lineage.facts.textFiles };
  };
  for (const [text, capacityM3] of [
    [outletAt(2), 400],
    [outletAt(2, 17.5), 550],
    [outletAt(2, 17.5), 550],
  ] as const) {
    expect(await ask(text)).toMatchObject({
      summary: { json: { capacityM3 } },
      textFiles: [{ sha256: sha256(text) }],
    });
  }
});
