import { OverbrimError } from '../core/error.ts';
import { type Directory, type TagEntry, type TiffFile, uint64, viewOf } from './directories.ts';

/** Tags that a terrain is read from (TIFF 6.0, GeoTIFF 1.1 and two of common use for rasters). */
export const tags = {
  subfileType: 254,
  width: 256,
  height: 257,
  bitsPerSample: 258,
  compression: 259,
  photometric: 262,
  stripOffsets: 273,
  orientation: 274,
  samplesPerPixel: 277,
  rowsPerStrip: 278,
  stripByteCounts: 279,
  predictor: 317,
  tileWidth: 322,
  tileHeight: 323,
  tileOffsets: 324,
  tileByteCounts: 325,
  sampleFormat: 339,
  cellScale: 33550,
  tiePoints: 33922,
  transformation: 34264,
  geoKeys: 34735,
  geoDoubles: 34736,
  geoText: 34737,
  metadata: 42112,
  noData: 42113,
} as const;

type Get = (view: DataView, at: number, littleEndian: boolean) => number;

const getters: Record<number, Get> = {
  1: (view, at) => view.getUint8(at),
  3: (view, at, little) => view.getUint16(at, little),
  4: (view, at, little) => view.getUint32(at, little),
  6: (view, at) => view.getInt8(at),
  8: (view, at, little) => view.getInt16(at, little),
  9: (view, at, little) => view.getInt32(at, little),
  11: (view, at, little) => view.getFloat32(at, little),
  12: (view, at, little) => view.getFloat64(at, little),
  13: (view, at, little) => view.getUint32(at, little),
  16: uint64,
  17: (view, at, little) => Number(view.getBigInt64(at, little)),
  18: uint64,
};

/** All numbers of a tag, empty when the directory has none. */
export async function numbersOf(tiff: TiffFile, directory: Directory, tag: number): Promise<Float64Array> {
  const entry = directory.entries.get(tag);
  if (!entry) return new Float64Array(0);
  const get = getters[entry.type];
  if (!get) {
    throw new OverbrimError(
      'unreadable',
      `Tag ${tag} of ${tiff.reader.name} has type ${entry.type}; expected numbers, so write the file anew.`,
    );
  }
  const view = viewOf(await valueBytes(tiff, entry));
  const step = entry.byteLength / entry.count;
  return Float64Array.from({ length: entry.count }, (_, i) => get(view, i * step, tiff.littleEndian));
}

/** The first number of a tag, or `otherwise` when the directory has none. */
export async function numberOf(
  tiff: TiffFile,
  directory: Directory,
  tag: number,
  otherwise: number,
): Promise<number> {
  const values = await numbersOf(tiff, directory, tag);
  return values.length === 0 ? otherwise : values[0];
}

/** The text of a tag without its closing zeros, null when the directory has none. */
export async function textOf(tiff: TiffFile, directory: Directory, tag: number): Promise<string | null> {
  const entry = directory.entries.get(tag);
  if (!entry) return null;
  const bytes = await valueBytes(tiff, entry);
  return new TextDecoder('latin1').decode(bytes).replace(/\0+$/, '');
}

async function valueBytes(tiff: TiffFile, entry: TagEntry): Promise<Uint8Array> {
  const { reader, limits } = tiff;
  if (entry.byteLength > limits.valueBytes) {
    throw new OverbrimError(
      'too-large',
      `Tag ${entry.tag} of ${reader.name} claims ${entry.byteLength} bytes; expected at most ${limits.valueBytes}, so write the file anew.`,
    );
  }
  return reader.logged(entry.at, entry.byteLength, `the values of tag ${entry.tag}`);
}
