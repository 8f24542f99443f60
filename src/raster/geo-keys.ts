import { OverbrimError } from '../core/error.ts';
import type { Directory, TiffFile } from './directories.ts';
import { numbersOf, tags, textOf } from './tag-values.ts';
import type { GeoKeyTags } from './terrain.ts';

/** Keys of OGC GeoTIFF 1.1 that are looked at by name here. */
export const keys = {
  modelType: 1024,
  rasterType: 1025,
  citation: 1026,
  geodeticCrs: 2048,
  geodeticCitation: 2049,
  angularUnits: 2054,
  projectedCrs: 3072,
  projectedCitation: 3073,
  linearUnits: 3076,
  linearUnitSize: 3077,
  vertical: 4096,
  verticalCitation: 4097,
  verticalUnits: 4099,
} as const;

/** Stands in a key for "defined by the other keys". */
export const userDefined = 32767;

export type GeoKeyValue = number | readonly number[] | string;

export interface GeoKeys {
  readonly tags: GeoKeyTags;
  readonly values: ReadonlyMap<number, GeoKeyValue>;
}

/** The CRS keys of a directory, null when it has none. */
export async function geoKeysOf(tiff: TiffFile, directory: Directory): Promise<GeoKeys | null> {
  const words = await numbersOf(tiff, directory, tags.geoKeys);
  if (words.length < 4) return null;
  return parsedGeoKeys(
    {
      directory: Array.from(words),
      doubles: Array.from(await numbersOf(tiff, directory, tags.geoDoubles)),
      ascii: (await textOf(tiff, directory, tags.geoText)) ?? '',
    },
    tiff.reader.name,
  );
}

/** @throws OverbrimError `unreadable` when a key points outside its values. */
export function parsedGeoKeys(geoKeys: GeoKeyTags, name: string): GeoKeys {
  const { directory, doubles, ascii } = geoKeys;
  const values = new Map<number, GeoKeyValue>();
  const count = Math.min(directory[3], Math.floor(directory.length / 4) - 1);
  for (let i = 1; i <= count; i++) {
    const [key, place, length, at] = directory.slice(4 * i, 4 * i + 4);
    if (place === 0) values.set(key, at);
    else if (place === tags.geoDoubles && at + length <= doubles.length) {
      values.set(key, length === 1 ? doubles[at] : doubles.slice(at, at + length));
    } else if (place === tags.geoText && at <= ascii.length) {
      values.set(key, ascii.slice(at, at + length).replace(/[|\0]+$/, ''));
    } else if (place === tags.geoKeys && at + length <= directory.length) {
      values.set(key, directory.slice(at, at + length));
    } else {
      throw new OverbrimError(
        'unreadable',
        `CRS key ${key} of ${name} points to values ${at} to ${at + length} of tag ${place}, which are not there; write the file anew.`,
      );
    }
  }
  return { tags: geoKeys, values };
}

export function numberKey({ values }: GeoKeys, key: number): number | null {
  const value = values.get(key);
  return typeof value === 'number' ? value : null;
}

export function textKey({ values }: GeoKeys, key: number): string | null {
  const value = values.get(key);
  return typeof value === 'string' && value.trim() !== '' ? value.trim() : null;
}
