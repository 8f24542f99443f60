import { OverbrimError } from '../core/error.ts';
import type { ByteSource } from './byte-source.ts';
import { type ValueMeaning, valueMeaning } from './cell-values.ts';
import { crsFromKeys } from './crs.ts';
import { type Directory, readDirectories, type TiffFile } from './directories.ts';
import type { EpsgLookup } from './epsg.ts';
import { type GeoKeys, geoKeysOf, keys, numberKey } from './geo-keys.ts';
import { type Placement, placementOf } from './georeference.ts';
import { type ImageLayout, imageLayout } from './image-layout.ts';
import type { ReadLimits } from './limits.ts';
import { RangeReader } from './range-reader.ts';
import { numberOf, tags } from './tag-values.ts';
import type { Crs, VerticalUnit } from './terrain.ts';
import { type Vertical, verticalOf } from './vertical.ts';
import { scaledMeaning, verticalScaleOf } from './vertical-scale.ts';

/** One elevation file, understood but with no cell read yet. */
export interface ElevationFile {
  readonly reader: RangeReader;
  /** The full resolution first, then overviews, each smaller than the last. */
  readonly levels: readonly ImageLayout[];
  readonly meaning: ValueMeaning;
  readonly crs: Crs;
  readonly geoKeys: GeoKeys;
  readonly pixelIsPoint: boolean;
  /** Of the full resolution. */
  readonly placement: Placement;
  readonly vertical: Vertical;
  /** What the georeference says of heights beyond their being stored as they are; null mostly. */
  readonly verticalRemark: string | null;
}

export interface FileOptions {
  readonly limits: ReadLimits;
  readonly verticalUnit: VerticalUnit | undefined;
  readonly epsg: EpsgLookup | undefined;
  readonly signal: AbortSignal | undefined;
}

/** Reads everything about a file but its cells; throws OverbrimError with what does not fit. */
export async function elevationFile(source: ByteSource, options: FileOptions): Promise<ElevationFile> {
  const reader = new RangeReader(source, options.signal);
  const tiff = await readDirectories(reader, options.limits);
  const [full, ...overviews] = await imagesOf(tiff);
  const layout = await imageLayout(tiff, full);
  const geoKeys = await geoKeysOf(tiff, full);
  const pixelIsPoint = geoKeys !== null && numberKey(geoKeys, keys.rasterType) === 2;
  const placement = await placementOf(tiff, full, pixelIsPoint);
  if (!geoKeys) {
    throw new OverbrimError(
      'unsupported',
      `${reader.name} tells no CRS (tag 34735); expected a GeoTIFF, so give the file the CRS that it is in.`,
    );
  }
  const crs = await crsFromKeys(geoKeys, reader.name, options.epsg);
  if (crs.kind === 'geographic') checkLatitudes(placement, layout.height, reader.name);
  const verticalScale = await verticalScaleOf(tiff, full, geoKeys);
  const stored = await valueMeaning(tiff, full, layout.sampleType);
  return {
    reader,
    levels: [layout, ...(await smallerLevels(tiff, overviews, layout))],
    meaning: scaledMeaning(stored, verticalScale, reader.name),
    crs,
    geoKeys,
    pixelIsPoint,
    placement,
    vertical: await verticalOf(geoKeys, reader.name, options.verticalUnit, options.epsg),
    verticalRemark: verticalScale.remark,
  };
}

/** The one full-resolution image and its overviews (tag 254: bit 0 an overview, bit 2 a mask; TIFF 6.0, section 8). */
async function imagesOf(tiff: TiffFile): Promise<Directory[]> {
  const full: Directory[] = [];
  const overviews: Directory[] = [];
  for (const directory of tiff.directories) {
    const kind = await numberOf(tiff, directory, tags.subfileType, 0);
    if (kind & 4) {
      throw new OverbrimError(
        'unsupported',
        `${tiff.reader.name} marks its voids by a mask image; expected a no-data value, so write it anew with one.`,
      );
    }
    (kind & 1 ? overviews : full).push(directory);
  }
  if (full.length !== 1) {
    throw new OverbrimError(
      'unsupported',
      `${tiff.reader.name} holds ${full.length} images; expected one with or without overviews, so write it to a file of its own.`,
    );
  }
  return [full[0], ...overviews];
}

/** Overviews that can stand for the image, from fine to coarse; others are passed over. */
async function smallerLevels(
  tiff: TiffFile,
  overviews: Directory[],
  full: ImageLayout,
): Promise<ImageLayout[]> {
  const levels: ImageLayout[] = [];
  for (const directory of overviews) {
    const level = await imageLayout(tiff, directory);
    if (level.width < full.width && level.sampleType === full.sampleType) levels.push(level);
  }
  return levels.sort((a, b) => b.width - a.width);
}

function checkLatitudes({ north, cellHeight }: Placement, height: number, name: string): void {
  const south = north - height * cellHeight;
  if (north > 90 + cellHeight * 0.501 || south < -90 - cellHeight * 0.501) {
    throw new OverbrimError(
      'unsupported',
      `${name} reaches from latitude ${south} to ${north}; expected −90 to 90, so mend its georeference.`,
    );
  }
}
