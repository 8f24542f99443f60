import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { fileSource } from '../../src/node/file-source.ts';
import { openTerrain } from '../../src/raster/open-terrain.ts';
import { cloudOptimizedGeoTiff } from '../../src/raster/write-cog.ts';
import { opened, refusal } from './open.ts';
import type { Tag, TiffSpec } from './tiff-builder.ts';

const folder = new URL('../data/vertical/', import.meta.url).pathname;
interface Expected {
  readonly scale: number;
  readonly offset: number;
  readonly values: readonly number[];
}
const expected: Record<string, Expected> = JSON.parse(readFileSync(`${folder}expected.json`, 'utf8'));

const double = (...values: number[]): Tag => ({ type: 12, values });
const navd88Metres = [
  [1024, 1],
  [3072, 32631],
  [4096, 5703],
] as const;
const withHeights = (
  tags: NonNullable<TiffSpec['tags']>,
  keys: TiffSpec['keys'] = navd88Metres,
): TiffSpec => ({
  width: 3,
  height: 1,
  values: [0, 1, 200],
  type: 'int16',
  keys,
  tags,
});
const scaled = (scaleZ: number, k: number, z: number): NonNullable<TiffSpec['tags']> => ({
  33550: double(2, 2, scaleZ),
  33922: double(0, 0, k, 500000, 5600000, z),
});
const matrix = (...third: [number, number, number, number]): NonNullable<TiffSpec['tags']> => ({
  33550: null,
  33922: null,
  34264: double(2, 0, 0, 500000, 0, -2, 0, 5600000, ...third, 0, 0, 0, 1),
});
const heights = async (spec: TiffSpec) => Array.from((await opened([spec])).grid.elevationM);

// Each file's values by rasterio (test/data/make_vertical_fixtures.py).
describe('vertical scale ignored: heights as an independent raster library reads them', () => {
  test.each(Object.keys(expected))('%s', async (name) => {
    const terrain = await openTerrain([await fileSource(`${folder}${name}.tif`)], { verticalUnit: 'm' });
    expect(terrain.grid.elevationM).toEqual(Float32Array.from(expected[name].values));
  });

  test('a scale that changes heights is said, one that does not is not', async () => {
    expect((await opened([withHeights(scaled(0.01, 0, 100))])).notices).toEqual([
      {
        kind: 'vertical-scale',
        message:
          'a.tif stores heights that its georeference (tag 33550) scales by 0.01 and adds 100 to; that was done.',
      },
    ]);
    for (const tags of [scaled(0, 0, 0), scaled(1, 0, 0), scaled(1, 5, 5)]) {
      expect((await opened([withHeights(tags)])).notices).toEqual([]);
    }
  });

  test('what is written is not scaled again', async () => {
    const { grid, georeference } = await opened([withHeights(scaled(0.01, 0, 100))]);
    const { width, height, elevationM } = grid;
    const bytes = cloudOptimizedGeoTiff({ width, height, samples: elevationM, noData: null, georeference });
    const back = await opened([bytes]);
    expect(back.grid.elevationM).toEqual(elevationM);
    expect(back.notices).toEqual([]);
  });

  test('the unit comes after the scale, the sign of depths last', async () => {
    const inUnit = (code: number) => [...navd88Metres.slice(0, 2), [4096, code]] as const;
    const stored = [100, 100.01, 102];
    expect(await heights(withHeights(scaled(0.01, 0, 100), inUnit(8228)))).toEqual(
      stored.map((feet) => Math.fround(feet * 0.3048)),
    );
    expect(await heights(withHeights(scaled(0.01, 0, 100), inUnit(6357)))).toEqual(
      stored.map((depth) => Math.fround(-depth)),
    );
  });
});

// OGC GeoTIFF 1.1, tag 34264: height = third row · (column, row, stored, 1); value from memory, no other reader compared.
describe('vertical scale ignored: in a transformation', () => {
  test('scale and offset', async () => {
    expect(await heights(withHeights(matrix(0, 0, 0.5, 7)))).toEqual([7, 7.5, 107]);
    expect(await heights(withHeights(matrix(0, 0, 1, 0)))).toEqual([0, 1, 200]);
    expect(await heights(withHeights(matrix(0, 0, 0, 0)))).toEqual([0, 1, 200]);
  });

  test('heights that depend on the place are refused', async () => {
    expect(await refusal(opened([withHeights(matrix(0.1, 0, 1, 0))]))).toBe(
      'unsupported: a.tif mixes heights with places (tag 34264); expected heights that depend on the stored value alone, so warp it to a level grid first.',
    );
  });
});

describe('vertical scale ignored: what cannot be meant', () => {
  test('scale 0 with an offset leaves values alone, and it is said', async () => {
    const { grid, notices } = await opened([withHeights(scaled(0, 0, 100))]);
    expect(Array.from(grid.elevationM)).toEqual([0, 1, 200]);
    expect(notices.map(({ message }) => message)).toEqual([
      'a.tif places height 0 at 100 but its vertical scale is 0 (tag 33550); both were left out, so mend its georeference if 100 is to be added.',
    ]);
  });

  test('a scale without a vertical CRS leaves values alone, and it is said', async () => {
    const terrain = await opened([withHeights(scaled(0.01, 0, 100), navd88Metres.slice(0, 2))], {
      verticalUnit: 'm',
    });
    expect(Array.from(terrain.grid.elevationM)).toEqual([0, 1, 200]);
    expect(terrain.notices.map(({ message }) => message)).toEqual([
      'a.tif scales heights by 0.01 and adds 100 in its georeference (tag 33550) but has no vertical CRS; both were left out, so give it a vertical CRS if the scale is meant.',
    ]);
  });

  test('no finite number is refused', async () => {
    expect(await refusal(opened([withHeights(scaled(Number.NaN, 0, 0))]))).toBe(
      'unsupported: a.tif scales heights by NaN and adds NaN (tag 33550); expected finite numbers, so mend its georeference.',
    );
  });

  const metadata = (scale: number, offset: number): Tag => ({
    type: 2,
    values: `<M><Item role="scale">${scale}</Item><Item role="offset">${offset}</Item></M>`,
  });

  test('the same scale twice counts once, one that changes nothing is silent, two that differ are refused', async () => {
    const both = (tag42112: Tag, tags: NonNullable<TiffSpec['tags']>) =>
      withHeights({ ...tags, 42112: tag42112 });
    expect(await heights(both(metadata(0.5, 7), scaled(0.5, 0, 7)))).toEqual([7, 7.5, 107]);
    expect(await heights(both(metadata(0.5, 7), scaled(1, 0, 0)))).toEqual([7, 7.5, 107]);
    expect(await heights(both(metadata(1, 0), scaled(0.5, 0, 7)))).toEqual([7, 7.5, 107]);
    expect(await refusal(opened([both(metadata(0.5, 7), scaled(0.01, 0, 100))]))).toBe(
      'unsupported: a.tif contradicts itself: its values are scaled by 0.5 plus 7 (tag 42112), its georeference by 0.01 plus 100; mend the tags so that both agree.',
    );
  });
});
