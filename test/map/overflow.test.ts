import type { FeatureCollection } from 'geojson';
import { get } from 'ol/proj.js';
import { describe, expect, it } from 'vitest';
import { checkMap } from '../../src/map/check-map.ts';
import { linkLine, overflowBearing } from '../../src/map/overflow.ts';
import { pondsOnView } from '../../src/map/pond-features.ts';

const square = (x: number, y: number, side: number) => [
  [x, y],
  [x + side, y],
  [x + side, y + side],
  [x, y + side],
  [x, y],
];

/** Two ponds in degrees: `west` overflows eastward into `east`, `east` northward to an outlet. */
const ponds: FeatureCollection = {
  type: 'FeatureCollection',
  features: [
    pond('west', 'east', 3, [[square(0, 0, 1)], [square(-5, 0, 0.5)]]),
    pond('east', null, 9, [[square(4, 0, 3)]]),
  ],
};
const pourPoints: FeatureCollection = {
  type: 'FeatureCollection',
  features: [sill('west', [1.5, 0.5]), sill('east', [5, 3.5])],
};

function pond(id: string, spillsInto: string | null, areaM2: number, coordinates: number[][][][]) {
  const geometry = { type: 'MultiPolygon' as const, coordinates };
  return { type: 'Feature' as const, geometry, properties: { id, spillsInto, areaM2 } };
}

function sill(of: string, coordinates: number[]) {
  return {
    type: 'Feature' as const,
    geometry: { type: 'Point' as const, coordinates },
    properties: { pond: of },
  };
}

const degrees = get('EPSG:4326');
if (!degrees) throw new Error('no degrees');
const found = pondsOnView(ponds, pourPoints, degrees);
const [west, east] = ['west', 'east'].map((id) => {
  const one = found.get(id);
  if (!one) throw new Error(`no ${id}`);
  return one;
});

describe('pondsOnView', () => {
  it('joins ponds with pour points and with each other, larger ones first', () => {
    expect([...found.keys()]).toEqual(['east', 'west']);
    expect(west.spillsInto).toBe(east);
    expect(east.spillsInto).toBeNull();
    expect(west.pourPoint).toEqual([1.5, 0.5]);
  });

  it('takes the inside of the largest piece', () => {
    expect(west.inside[0]).toBeGreaterThan(0);
    expect(west.inside[0]).toBeLessThan(1);
    expect(west.reach).toBe(6);
  });

  it('places them in the projection of the view', () => {
    const mercator = get('EPSG:3857');
    if (!mercator) throw new Error('no web mercator');
    // 1.5° of longitude on a sphere of radius 6378137 m (EPSG method 1024).
    expect(pondsOnView(ponds, pourPoints, mercator).get('west')?.pourPoint?.[0]).toBeCloseTo(
      (1.5 * Math.PI * 6378137) / 180,
      6,
    );
  });
});

describe('overflowBearing', () => {
  it('points to the nearest shore of the next pond', () => {
    expect(overflowBearing(west)).toBeCloseTo(Math.PI / 2, 12);
  });

  it('points away from the own water where none follows', () => {
    expect(overflowBearing(east)).toBeCloseTo(0, 12);
  });
});

describe('linkLine', () => {
  it('leads from the pour point into the next pond', () => {
    const line = linkLine(west) ?? [];
    expect(line[0]).toEqual([1.5, 0.5]);
    expect(line[line.length - 1][0]).toBeCloseTo(east.inside[0], 12);
    expect(line[line.length - 1][1]).toBeCloseTo(east.inside[1], 12);
    // It leaves away from the own water, which lies in the west.
    expect(line[1][0]).toBeGreaterThan(1.5);
    expect(linkLine(east)).toBeNull();
  });
});

describe('checkMap', () => {
  it.each([
    [
      undefined,
      'Nothing was given as the map; expected an OpenLayers Map, so pass the object that new Map(…) returned.',
    ],
    [
      'town',
      'A string was given as the map; expected an OpenLayers Map, so pass the object that new Map(…) returned.',
    ],
    [
      new Date(),
      'An object of kind Date was given as the map; expected an OpenLayers Map, so pass the object that new Map(…) returned.',
    ],
  ])('refuses %s', (value, sentence) => {
    expect(() => checkMap(value)).toThrow(sentence);
  });
});
