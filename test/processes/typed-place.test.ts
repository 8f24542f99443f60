import { describe, expect, it } from 'vitest';
import type { Json } from '../../src/host/index.ts';
import { spillPath } from '../../src/processes/index.ts';
import { isTypedPlace } from '../../src/processes/typed-place.ts';
import { type MadePlace, runInMemory, terrainFile } from './made-terrain.ts';
import { floorWithVoid, twoPonds } from './small-terrains.ts';

const refused = async (
  rows: readonly (readonly number[])[],
  from: string,
  message: string | RegExp,
  inputs: Readonly<Record<string, Json>> = {},
  place: MadePlace = {},
) => {
  const run = runInMemory(spillPath, { 'made.tif': await terrainFile(rows, place) }, { from, ...inputs });
  await expect(run).rejects.toThrow(message);
  await expect(run).rejects.toMatchObject({ code: 'bad-input' });
};

describe('typed places', () => {
  it.each(['1,2', ' -1.5 , +.5 ', '1e3,2.'])('knows "%s"', (text) => expect(isTypedPlace(text)).toBe(true));

  it.each(['', '1', '1;2', '1,2,3', 'a,b', '1.5.2,3', 'outlets.geojson', '1,'])(
    'does not know "%s"',
    (text) => expect(isTypedPlace(text)).toBe(false),
  );

  it.each(['500015;985', '500015', 'here', '500015 985', '500.015,0,985'])('refuses "%s"', async (text) => {
    await refused(
      twoPonds,
      text,
      `The input "from" is "${text}"; expected a coordinate as x,y with a point as decimal sign, such as 1234.5,678.9.`,
    );
  });

  it('refuses a place outside and says how far the terrain reaches', async () => {
    await refused(
      twoPonds,
      '985,500015',
      'The place 985,500015 (WGS 84 / UTM zone 31N) lies outside the terrain, which reaches from 500000,970 to 500100,1000 (WGS 84 / UTM zone 31N); check the coordinate, the order x,y and the input "crs".',
    );
    await refused(twoPonds, '3.1,0.0089', /^The place 3\.1,0\.0089 \(WGS 84\) lies outside the terrain/, {
      crs: 'EPSG:4326',
    });
  });

  it('refuses a place on a void', async () => {
    await refused(
      floorWithVoid,
      '500025,975',
      'The place 500025,975 lies on a cell without elevation (column 2, row 2); choose a place on known ground.',
    );
  });

  it.each(['1e300,0', '-1e300,0', '1e999,0', '0,1e999'])('comes back from the far place %s', async (text) => {
    const place = { epsg: 4326, west: -10, north: 1, cellSize: 1 };
    await refused(twoPonds, text, /lies outside the terrain, which reaches from -10,-2 to 0,1/, {}, place);
  });
});
