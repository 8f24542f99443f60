import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { Json } from '../../src/host/index.ts';
import { depressions } from '../../src/processes/index.ts';
import { foundPonds } from './found-ponds.ts';
import { runInMemory } from './made-terrain.ts';

/** Real elevation, so that the hierarchy is deep; see test/data/README.md. */
describe('a real town', async () => {
  const file = { 'olinda.tif': new Uint8Array(readFileSync('test/data/olinda_dem_utm25s.tif')) };
  const run = async (inputs: Record<string, Json>) =>
    foundPonds(await runInMemory(depressions, file, { verticalUnit: 'm', ...inputs }));
  const all = await run({});
  const nested = await run({ nested: true });
  type Pond = Record<'id' | 'parent' | 'spillsInto', string> &
    Record<'catchmentAreaM2' | 'contributingAreaM2' | 'areaM2' | 'capacityM3', number>;
  const ponds = Object.values(all.byId) as Pond[];

  it('loses no ground on the way to the outlets', () => {
    const close = (sum: number) => expect.closeTo(sum, 2);
    for (const pond of ponds) {
      const above = ponds.filter(({ spillsInto }) => spillsInto === pond.id);
      expect(pond.contributingAreaM2).toEqual(
        close(above.reduce((sum, { contributingAreaM2 }) => sum + contributingAreaM2, pond.catchmentAreaM2)),
      );
    }
    const last = ponds.filter(({ spillsInto }) => spillsInto === null);
    const own = ponds.reduce((sum, { catchmentAreaM2 }) => sum + catchmentAreaM2, 0);
    expect(last.reduce((sum, { contributingAreaM2 }) => sum + contributingAreaM2, 0)).toEqual(close(own));
    expect(ponds.length).toBeGreaterThan(20);
  });

  it('sums area and capacity of the outermost ponds whatever the filter', async () => {
    const filtered = await run({ minDepth: 3, minArea: 20_000, minCapacity: 50_000 });
    expect(filtered.summary).toEqual(all.summary);
    expect(all.summary).toHaveProperty(
      'capacityM3',
      expect.closeTo(
        ponds.reduce((sum, { capacityM3 }) => sum + capacityM3, 0),
        3,
      ),
    );
    const kept = Object.values(filtered.byId) as Pond[];
    expect(kept.length).toBeGreaterThan(0);
    expect(kept.length).toBeLessThan(ponds.length);
  });

  it('names a pond the same with and without nested ones and minima, and refers to written ponds only', async () => {
    for (const inputs of [{}, { nested: true }, { minDepth: 2 }, { nested: true, minDepth: 2 }]) {
      const { byId, pourPoints } = await run(inputs);
      const every = Object.values(byId) as Pond[];
      for (const pond of every) {
        const { id, parent, spillsInto, areaM2, capacityM3 } = pond;
        expect(nested.byId[id]).toMatchObject({ areaM2, capacityM3 });
        for (const other of [parent, spillsInto]) if (other !== null) expect(byId).toHaveProperty([other]);
      }
      expect(pourPoints.features.map(({ properties }) => properties?.pond).sort()).toEqual(
        every.map(({ id }) => id).sort(),
      );
    }
    const outermost = (Object.values(nested.byId) as Pond[]).filter(({ parent }) => parent === null);
    expect(outermost.map(({ id }) => id).sort()).toEqual(ponds.map(({ id }) => id).sort());
    expect(nested.ponds.features.length).toBeGreaterThan(ponds.length);
  });
});
