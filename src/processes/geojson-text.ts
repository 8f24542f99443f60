import type { Feature } from 'geojson';

/** A GeoJSON feature collection as text, a feature a line, made one by one. */
export function* featureCollectionText(features: Iterable<Feature>): Generator<string> {
  yield '{"type":"FeatureCollection","features":[';
  let separator = '\n';
  for (const feature of features) {
    yield separator + JSON.stringify(feature);
    separator = ',\n';
  }
  yield '\n]}\n';
}

/** Degrees with 7 decimals, about a centimetre. */
export function degrees(value: number): number {
  return Number(value.toFixed(7));
}

/** Twelve significant digits: more than the sums hold, fewer than rounding noise shows. */
export function figure(value: number): number {
  return Number(value.toPrecision(12));
}

/** The shortest decimal number that is the same float32, so that 12.34 is written 12.34. */
export function float32Figure(value: number): number {
  for (let digits = 1; digits < 9; digits++) {
    const shorter = Number(value.toPrecision(digits));
    if (Math.fround(shorter) === value) return shorter;
  }
  return Number(value.toPrecision(9));
}
