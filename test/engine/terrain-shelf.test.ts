import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { noOutletCells } from '../../src/core/index.ts';
import { TerrainShelf } from '../../src/engine/index.ts';
import type { JobContext } from '../../src/host/index.ts';
import { epsgFiles } from '../../src/node/index.ts';
import { type ByteSource, memorySource } from '../../src/raster/byte-source.ts';
import { terrainFile } from '../processes/made-terrain.ts';
import { twoPonds } from '../processes/small-terrains.ts';

const file = await terrainFile(twoPonds, { verticalUnit: null });

/** A shelf over files in memory that counts what is opened and closed. */
function shelfOf(files: Readonly<Record<string, Uint8Array>>) {
  const opened: string[] = [];
  const closed: string[] = [];
  const shelf = new TerrainShelf({
    source: async (reference): Promise<ByteSource> => {
      if (files[reference] === undefined) throw new Error(`no ${reference}`);
      opened.push(reference);
      const source = memorySource(reference, files[reference]);
      return {
        ...source,
        close: async () => {
          closed.push(reference);
        },
      };
    },
    epsg: epsgFiles,
  });
  return { shelf, opened, closed };
}

function contextOf(): { context: JobContext; breaths: () => number; told: [number, string][] } {
  let breaths = 0;
  const told: [number, string][] = [];
  const context: JobContext = {
    signal: new AbortController().signal,
    progress: (done, doing) => told.push([done, doing]),
    breathe: async () => {
      breaths++;
    },
    note: () => {},
    record: () => {},
  };
  return { context, breaths: () => breaths, told };
}

describe('TerrainShelf', () => {
  it('reads a terrain once, and again in another unit', async () => {
    const { shelf, opened, closed } = shelfOf({ a: file });
    const { context } = contextOf();
    const metres = await shelf.terrain({ references: ['a'], verticalUnit: 'm' }, context);
    expect(await shelf.terrain({ references: ['a'], verticalUnit: 'm' }, context)).toBe(metres);
    expect(opened).toEqual(['a']);
    const feet = await shelf.terrain({ references: ['a'], verticalUnit: 'ft' }, context);
    expect(feet.grid.elevationM[12] / metres.grid.elevationM[12]).toBeCloseTo(0.3048, 7);
    expect(closed).toEqual(opened);
  });

  it('lets go of all but the two terrains asked for last', async () => {
    const { shelf, opened } = shelfOf({ a: file, b: file, c: file });
    const { context } = contextOf();
    for (const name of ['a', 'b', 'a', 'c', 'a', 'c']) {
      await shelf.terrain({ references: [name], verticalUnit: 'm' }, context);
    }
    expect(opened).toEqual(['a', 'b', 'c']);
    await shelf.terrain({ references: ['b'], verticalUnit: 'm' }, context);
    await shelf.terrain({ references: ['a'], verticalUnit: 'm' }, context);
    expect(opened).toEqual(['a', 'b', 'c', 'b', 'a']);
  });

  it('surveys once for each choice of neighbours and made pits', async () => {
    const { shelf } = shelfOf({ a: file });
    const { context, breaths, told } = contextOf();
    const terrain = await shelf.terrain({ references: ['a'], verticalUnit: 'm' }, context);
    const none = noOutletCells.cell;
    const survey = await shelf.survey(terrain, 8, none, context);
    const after = breaths();
    expect(after).toBeGreaterThan(0);
    expect(await shelf.survey(terrain, 8, none, context)).toBe(survey);
    expect(breaths()).toBe(after);
    expect(await shelf.survey(terrain, 4, none, context)).not.toBe(survey);
    const withPit = await shelf.survey(terrain, 8, Float64Array.of(13), context);
    expect(withPit.leaves).toBe(survey.leaves + 1);
    expect(told.every(([done]) => done >= 0 && done <= 0.8)).toBe(true);
  });

  it('closes what it opened when one of several files is not there', async () => {
    const { shelf, opened, closed } = shelfOf({ a: file });
    await expect(
      shelf.terrain({ references: ['a', 'b'], verticalUnit: 'm' }, contextOf().context),
    ).rejects.toThrow('no b');
    expect(closed).toEqual(opened);
    expect(opened).toEqual(['a']);
  });

  it('calls a file that cannot be a terrain unreadable', async () => {
    const infinite = await terrainFile([[1, Number.NEGATIVE_INFINITY]]);
    const { shelf, closed } = shelfOf({ a: infinite });
    await expect(shelf.terrain({ references: ['a'] }, contextOf().context)).rejects.toMatchObject({
      code: 'unreadable',
    });
    expect(closed).toEqual(['a']);
  });

  it('finds CRS by code and small texts by reference', async () => {
    const { shelf, closed } = shelfOf({ a: new TextEncoder().encode('größer'), empty: new Uint8Array(0) });
    // SHA-256 by Node's own hash.
    const sha256 = createHash('sha256').update('größer').digest('hex');
    expect(await shelf.text('a')).toEqual({ name: 'a', text: 'größer', sha256 });
    expect(await shelf.text('empty')).toMatchObject({ text: '' });
    expect(closed).toEqual(['a', 'empty']);
    expect(await shelf.crs(32631)).toMatchObject({ kind: 'projected', epsg: 32631, unitM: 1 });
  });
});
