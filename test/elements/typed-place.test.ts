import { get } from 'ol/proj.js';
import { describe, expect, it } from 'vitest';
import { pitOf } from '../../src/elements/pit-of.ts';
import type { SurveyView } from '../../src/elements/running.ts';
import { pairText, typedPair } from '../../src/elements/typed-pair.ts';
import { isOutside, pickedText, placeAsked, placeExample } from '../../src/elements/typed-place.ts';

/** Two columns by three rows of 10 m in UTM zone 31N; two ponds side by side. */
const survey = {
  width: 2,
  height: 3,
  elevationM: Float32Array.of(5, 9, 4, 9, 4, 3),
  leaf: Int32Array.of(0, 1, 0, 1, 0, 1),
  levelM: Float32Array.of(6, 8),
  pondOfLeaf: Int32Array.of(0, 1),
  ponds: ['west', 'east'],
  georeference: {
    west: 500_000,
    north: 5_000_030,
    cellWidth: 10,
    cellHeight: 10,
    crs: {
      kind: 'projected',
      name: 'WGS 84 / UTM zone 31N',
      epsg: 32631,
      proj4: '+proj=utm +zone=31 +datum=WGS84 +units=m +no_defs',
      unitM: 1,
      semiMajorM: 6_378_137,
      semiMinorM: 6_356_752.314245,
    },
  },
} as unknown as SurveyView;

describe('placeAsked', () => {
  it.each(['1.5,-2', ' 1.5 , -2 ', '1.5 -2', '1.5;-2'])('takes "%s"', (text) => {
    expect(placeAsked(text, 'terrain', null, survey)).toEqual({ from: '1.5,-2', crs: null });
  });

  it.each(['', '1.5', 'north', '1,2,3', '1,5 2'])('refuses "%s"', (text) => {
    expect(placeAsked(text, 'terrain', null, survey)).toBe(null);
  });

  it('leaves longitude and latitude to the process', () => {
    expect(placeAsked('3,45', 'lonLat', null, survey)).toEqual({ from: '3,45', crs: 'EPSG:4326' });
  });

  it('leads a coordinate of the view to the terrain: 3° E on the equator is 500 km E, 0 N in zone 31 (definition)', () => {
    const mercator = get('EPSG:3857');
    const x = (3 * Math.PI * 6_378_137) / 180;
    const place = placeAsked(`${x},0`, 'view', mercator, survey);
    const [east, north] = (place?.from ?? '').split(',').map(Number);
    expect(place?.crs).toBe(null);
    expect(east).toBeCloseTo(500_000, 6);
    expect(north).toBeCloseTo(0, 6);
  });
});

// How the languages write decimals: Unicode CLDR, as Node carries it.
describe('typedPair', () => {
  it.each([
    ['1,5 -2', '1.5', '-2'],
    ['1,5; 2,25', '1.5', '2.25'],
    ['3, 45', '3', '45'],
    ['471234.5, 4587321.5', '471234.5', '4587321.5'],
    ['471234.5,4587321.5', '471234.5', '4587321.5'],
  ])('reads in German "%s"', (text, x, y) => {
    expect(typedPair(text, 'de')).toEqual([x, y]);
  });

  it.each(['3,45', '1,5,2', '471.234,5', '48.123 9.5', '1,5'])('refuses in German "%s"', (text) => {
    expect(typedPair(text, 'de')).toBe(null);
  });

  it.each(['en', 'de'])('reads in %s what is written', (tag) => {
    expect(typedPair(pairText(48.123, -9.5, 7, tag), tag)).toEqual(['48.1230000', '-9.5000000']);
  });
});

describe('a place and the terrain', () => {
  it('is outside beyond its extent, in whatever it is given', () => {
    const outside = (from: string, crs: string | null = null) => isOutside({ from, crs }, survey);
    expect(outside('500000,5000000')).toBe(false);
    expect(outside('500020,5000030')).toBe(false);
    expect(outside('500020.1,5000030')).toBe(true);
    expect(outside('5000015,500010')).toBe(true);
    expect(outside('3,0', 'EPSG:4326')).toBe(true);
  });

  it('is written as the middle of the cell that was picked', () => {
    expect(pickedText(500_009.9999, 5_000_020.0001, survey, 'en')).toBe('500005.00, 5000025.00');
    expect(pickedText(500_010, 5_000_020, survey, 'en')).toBe('500015.00, 5000015.00');
    // The outer south-east corner counts as inside.
    expect(pickedText(500_020, 5_000_000, survey, 'de')).toBe('500015,00; 5000005,00');
  });

  it('has an example in the middle that is inside, in whatever it is typed', () => {
    const mercator = get('EPSG:3857');
    expect(placeExample('terrain', null, survey, 'en')).toBe('500010.00, 5000015.00');
    expect(placeExample('terrain', null, survey, 'de')).toBe('500010,00; 5000015,00');
    for (const tag of ['en', 'de']) {
      for (const crs of ['terrain', 'view', 'lonLat'] as const) {
        const asked = placeAsked(placeExample(crs, mercator, survey, tag), crs, mercator, survey, tag);
        expect(asked && isOutside(asked, survey)).toBe(false);
      }
    }
  });
});

describe('pitOf', () => {
  it('is the centre of the lowest wet cell, of equals the first', () => {
    expect(pitOf(survey, 'west')).toEqual([500_005, 5_000_015]);
    expect(pitOf(survey, 'east')).toEqual([500_015, 5_000_005]);
  });

  it('is nowhere for a pond that is not there', () => {
    expect(pitOf(survey, 'south')).toBe(null);
  });
});
