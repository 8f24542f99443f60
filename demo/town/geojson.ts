/** Metres east and south of the north-west corner to longitude and latitude in degrees (CRS84). */
export type ToLonLat = (x: number, y: number) => readonly [number, number];

type Points = readonly (readonly [number, number])[];

/** A feature as one line of text. */
export function lineFeature(line: Points, properties: object, toLonLat: ToLonLat): string {
  return feature('LineString', `[${positions(line, toLonLat).join(',')}]`, properties);
}

/** The ring is given unclosed in any turn; RFC 7946 wants it closed and counter-clockwise. */
export function polygonFeature(ring: Points, properties: object, toLonLat: ToLonLat): string {
  const [first, ...rest] = turnedLeft(ring);
  const closed = positions([first, ...rest, first], toLonLat);
  return feature('Polygon', `[[${closed.join(',')}]]`, properties);
}

/** One feature a line, so that differences can be read. */
export function collection(features: readonly string[]): string {
  return `{"type":"FeatureCollection","features":[\n${features.join(',\n')}\n]}\n`;
}

function feature(type: string, coordinates: string, properties: object): string {
  return `{"type":"Feature","properties":${JSON.stringify(properties)},"geometry":{"type":"${type}","coordinates":${coordinates}}}`;
}

function positions(points: Points, toLonLat: ToLonLat): string[] {
  return points.map(([x, y]) => {
    const [longitude, latitude] = toLonLat(x, y);
    return `[${longitude.toFixed(7)},${latitude.toFixed(7)}]`;
  });
}

function turnedLeft(ring: Points): Points {
  let doubleArea = 0;
  for (let i = 0; i < ring.length; i++) {
    const [ax, ay] = ring[i];
    const [bx, by] = ring[(i + 1) % ring.length];
    doubleArea += ax * by - bx * ay;
  }
  // y counts southwards here, so a positive area turns clockwise on the map.
  return doubleArea > 0 ? [...ring].reverse() : ring;
}
