import type { GeoKeyTags, Georeference, VerticalUnit } from './terrain.ts';
import type { Directory, Field } from './tiff-layout.ts';

const rasterTypeKey = 1025;
const pixelIsPointCode = 2;
const verticalKey = 4096;
const verticalUnitsKey = 4099;
const userDefined = 32767;
const metreCode = 9001;

/**
 * Place and CRS as tags of OGC GeoTIFF 1.1 (19-008r4): 33550, 33922, and the key tags 34735 to 34737 as they
 * stood in the input, and heights as they are stored (ScaleZ 0, tie point at height 0). The tie point is the outer corner, or the first cell's centre when cells stand for points.
 */
export function geoTags(georeference: Georeference): Directory {
  const { west, north, cellWidth, cellHeight, pixelIsPoint, geoKeys } = georeference;
  const inset = pixelIsPoint ? 0.5 : 0;
  const tags = new Map<number, Field>();
  tags.set(33550, { type: 'double', values: [cellWidth, cellHeight, 0] });
  tags.set(33922, {
    type: 'double',
    values: [0, 0, 0, west + inset * cellWidth, north - inset * cellHeight, 0],
  });
  if (geoKeys.directory.length > 0) tags.set(34735, { type: 'short', values: geoKeys.directory });
  if (geoKeys.doubles.length > 0) tags.set(34736, { type: 'double', values: geoKeys.doubles });
  if (geoKeys.ascii.length > 0) tags.set(34737, { type: 'ascii', bytes: keyText(geoKeys.ascii) });
  return tags;
}

/** Whether the keys say that cells stand for points (GTRasterTypeGeoKey); areas when they say nothing. */
export function keysSayPoint(keys: GeoKeyTags): boolean {
  const { directory } = keys;
  for (let i = 4; i + 3 < directory.length; i += 4) {
    if (directory[i] === rasterTypeKey) return directory[i + 3] === pixelIsPointCode;
  }
  return false;
}

/**
 * The keys for elevations that were converted to heights in metres: unchanged for a file of such or without vertical
 * keys; else the vertical CRS, whose unit or downward axis no longer holds, gives way to a user-defined one in metres.
 */
export function keysInMetres(keys: GeoKeyTags, fileUnit: VerticalUnit, fromDepths: boolean): GeoKeyTags {
  if (fileUnit === 'm' && !fromDepths) return keys;
  const { directory } = keys;
  const kept: number[] = [];
  for (let i = 4; i + 3 < directory.length; i += 4) {
    const key = directory[i];
    if (key < verticalKey || key > verticalUnitsKey) kept.push(...directory.slice(i, i + 4));
  }
  if (kept.length + 4 >= directory.length) return keys;
  kept.push(verticalKey, 0, 1, userDefined, verticalUnitsKey, 0, 1, metreCode);
  return { ...keys, directory: [...directory.slice(0, 3), kept.length / 4, ...kept] };
}

/** The text as it was read, byte for byte, ended by one NUL. */
function keyText(text: string): Uint8Array {
  const bare = text.replace(/\0+$/, '');
  const bytes = new Uint8Array(bare.length + 1);
  for (let i = 0; i < bare.length; i++) {
    const code = bare.charCodeAt(i);
    bytes[i] = code < 256 ? code : 63;
  }
  return bytes;
}
