import { readFileSync } from 'node:fs';
import proj4 from 'proj4';
import { describe, expect, it } from 'vitest';
import { plan } from '../../demo/town/plan.ts';

interface Feature {
  readonly type: string;
  readonly properties: Record<string, unknown>;
  readonly geometry: { readonly type: string; readonly coordinates: number[][] | number[][][] };
}

function features(name: string): Feature[] {
  const text = readFileSync(new URL(`../../demo/town/${name}`, import.meta.url), 'utf8');
  const read: { type: string; features: Feature[] } = JSON.parse(text);
  expect(read.type).toBe('FeatureCollection');
  return read.features;
}

const toMetres = proj4('+proj=longlat +datum=WGS84', '+proj=utm +zone=10 +south +datum=WGS84 +units=m');

function signedArea(ring: number[][]): number {
  const points = ring.map(([longitude, latitude]) => toMetres.forward([longitude, latitude]));
  let doubled = 0;
  for (let i = 1; i < points.length; i++) {
    const [ax, ay] = [points[i - 1][0] - plan.west, points[i - 1][1] - plan.north];
    const [bx, by] = [points[i][0] - plan.west, points[i][1] - plan.north];
    doubled += ax * by - bx * ay;
  }
  return doubled / 2;
}

describe('features of the invented town, by RFC 7946', () => {
  it.each(['buildings.geojson', 'land-cover.geojson'])('%s: rings closed and counter-clockwise', (name) => {
    const read = features(name);
    expect(read.length).toBeGreaterThan(20);
    for (const { geometry } of read) {
      expect(geometry.type).toBe('Polygon');
      const [ring] = geometry.coordinates as number[][][];
      expect(ring.length).toBeGreaterThanOrEqual(4);
      expect(ring[0]).toEqual(ring.at(-1));
      expect(signedArea(ring)).toBeGreaterThan(0);
    }
  });

  it('land cover fills the town once: its areas add up to 2 km × 2 km', () => {
    const areas = features('land-cover.geojson').map((f) =>
      signedArea((f.geometry.coordinates as number[][][])[0]),
    );
    // 7 decimals are about 1 cm: a metre of tolerance for a square metre over all vertices is ample.
    expect(areas.reduce((sum, area) => sum + area, 0)).toBeCloseTo(4_000_000, -2);
  });

  it.each(['streets.geojson', 'culverts.geojson'])('%s: lines within the town', (name) => {
    const read = features(name);
    expect(read.length).toBeGreaterThan(5);
    for (const { geometry } of read) {
      expect(geometry.type).toBe('LineString');
      for (const [longitude, latitude] of geometry.coordinates as number[][]) {
        const [x, y] = toMetres.forward([longitude, latitude]);
        expect(x).toBeGreaterThan(plan.west);
        expect(x).toBeLessThan(plan.west + plan.size);
        expect(y).toBeLessThan(plan.north);
        expect(y).toBeGreaterThan(plan.north - plan.size);
      }
    }
  });
});
