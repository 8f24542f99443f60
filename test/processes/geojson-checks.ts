import { readFileSync } from 'node:fs';
import { type Schema, Validator } from '@cfworker/json-schema';
import type { FeatureCollection, Position } from 'geojson';
import { expect } from 'vitest';

/** Source: the published schema of RFC 7946; see test/data/geojson. */
const schema: Schema = JSON.parse(readFileSync('test/data/geojson/FeatureCollection.json', 'utf8'));
const validator = new Validator(schema, '7', false);

/** Twice the signed area of a ring: positive when it runs counter-clockwise. */
export function turn(ring: readonly Position[]): number {
  let sum = 0;
  for (let i = 0; i + 1 < ring.length; i++) sum += ring[i][0] * ring[i + 1][1] - ring[i + 1][0] * ring[i][1];
  return sum;
}

/**
 * Holds a document against RFC 7946: the schema, closed rings of at least 4 positions, outer ones counter-clockwise
 * and holes clockwise (3.1.6), longitudes and latitudes in range, and 7 decimals.
 */
export function checkGeoJson(document: unknown): FeatureCollection {
  expect(validator.validate(document).errors).toEqual([]);
  const collection = document as FeatureCollection;
  for (const { geometry } of collection.features) {
    if (geometry.type === 'MultiPolygon') {
      expect(geometry.coordinates.length).toBeGreaterThan(0);
      for (const polygon of geometry.coordinates) {
        polygon.forEach((ring, i) => {
          expect(ring.length).toBeGreaterThanOrEqual(4);
          expect(ring.at(-1)).toEqual(ring[0]);
          expect(Math.sign(turn(ring))).toBe(i === 0 ? 1 : -1);
        });
      }
    }
    for (const [longitude, latitude] of positionsOf(geometry)) {
      expect(Math.abs(longitude)).toBeLessThanOrEqual(180);
      expect(Math.abs(latitude)).toBeLessThanOrEqual(90);
      expect([longitude, latitude]).toEqual([Number(longitude.toFixed(7)), Number(latitude.toFixed(7))]);
    }
  }
  return collection;
}

function positionsOf(geometry: FeatureCollection['features'][number]['geometry']): Position[] {
  if (geometry.type === 'GeometryCollection') return geometry.geometries.flatMap(positionsOf);
  const flat: number[] = (geometry.coordinates as unknown[]).flat(9) as number[];
  return Array.from({ length: flat.length / 2 }, (_, i) => flat.slice(2 * i, 2 * i + 2));
}

/** Properties of all features, by a key among them. */
export function propertiesBy(collection: FeatureCollection, key: string): Record<string, object> {
  return Object.fromEntries(
    collection.features.map(({ properties }) => [String(properties?.[key]), properties ?? {}]),
  );
}
