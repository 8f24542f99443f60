import { OverbrimError } from '../core/error.ts';
import { compressionNames, readableCompressions } from './decode-block.ts';
import type { Directory, TiffFile } from './directories.ts';
import { type SampleType, sampleBytes, sampleTypeOf } from './sample-type.ts';
import { numberOf, numbersOf, tags } from './tag-values.ts';

/** How one image of a TIFF file is cut into blocks (strips or tiles) and stored. */
export interface ImageLayout {
  readonly tiff: TiffFile;
  readonly directory: Directory;
  readonly width: number;
  readonly height: number;
  /** Strips are blocks as wide as the image; the last one is cut at the bottom, tiles are always whole. */
  readonly tiled: boolean;
  readonly blockWidth: number;
  readonly blockHeight: number;
  readonly blocksAcross: number;
  readonly blocksDown: number;
  readonly compression: number;
  readonly predictor: number;
  readonly sampleType: SampleType;
  readonly littleEndian: boolean;
}

/**
 * Reads and checks the layout of one directory; no cell is read.
 * @throws OverbrimError `unsupported` (bands, compression, sample type, colours), `too-large` (a block), `unreadable`.
 */
export async function imageLayout(tiff: TiffFile, directory: Directory): Promise<ImageLayout> {
  const { name } = tiff.reader;
  const one = (tag: number, otherwise: number) => numberOf(tiff, directory, tag, otherwise);
  const width = await one(tags.width, 0);
  const height = await one(tags.height, 0);
  if (!(width >= 1 && height >= 1)) {
    throw new OverbrimError(
      'unreadable',
      `${name} claims ${width} × ${height} cells; expected at least 1 × 1, so write the file anew.`,
    );
  }
  const bands = await one(tags.samplesPerPixel, 1);
  if (bands !== 1) {
    throw unsupported(
      `${name} has ${bands} bands; expected one band of elevations, so write that band to a file of its own.`,
    );
  }
  if ((await one(tags.photometric, 1)) === 3) {
    throw unsupported(
      `${name} holds colours of a palette; expected elevations, so open the elevation file, not its picture.`,
    );
  }
  const orientation = await one(tags.orientation, 1);
  if (orientation !== 1) {
    throw unsupported(
      `${name} is stored with orientation ${orientation}; expected 1 (first row on top, first column left), so write it anew.`,
    );
  }
  const compression = await one(tags.compression, 1);
  if (!readableCompressions.has(compression)) {
    const found = compressionNames[compression] ?? 'unknown';
    throw unsupported(
      `${name} is compressed by method ${compression} (${found}); expected none, LZW, deflate, PackBits or Zstandard, so write it anew with deflate.`,
    );
  }
  const bits = await one(tags.bitsPerSample, 1);
  const format = await one(tags.sampleFormat, 1);
  const sampleType = sampleTypeOf(format, bits);
  if (!sampleType) {
    const kind = ['', 'unsigned', 'signed', 'floating point'][format] || `format ${format}`;
    throw unsupported(
      `${name} holds ${kind} values of ${bits} bits; expected integers of 8, 16 or 32 or floating point of 16, 32 or 64 bits, so write it anew.`,
    );
  }
  const predictor = await one(tags.predictor, 1);
  const floating = sampleType.startsWith('float');
  if (!(predictor === 1 || predictor === 2 || (predictor === 3 && floating))) {
    throw unsupported(
      `${name} uses predictor ${predictor} on ${sampleType} values; expected 1, 2 or (floating point) 3, so write it anew.`,
    );
  }
  const tiled = directory.entries.has(tags.tileWidth);
  const blockWidth = tiled ? await one(tags.tileWidth, 0) : width;
  const blockHeight = tiled
    ? await one(tags.tileHeight, 0)
    : Math.min(height, await one(tags.rowsPerStrip, height));
  if (!(blockWidth >= 1 && blockHeight >= 1)) {
    throw new OverbrimError(
      'unreadable',
      `${name} claims blocks of ${blockWidth} × ${blockHeight} cells; expected at least 1 × 1, so write the file anew.`,
    );
  }
  const blockBytes = blockWidth * blockHeight * sampleBytes[sampleType];
  if (compression !== 1 && blockBytes > tiff.limits.blockBytes) {
    throw new OverbrimError(
      'too-large',
      `A block of ${name} unpacks to ${blockBytes} bytes; expected at most ${tiff.limits.blockBytes}, so write it anew in tiles.`,
    );
  }
  return {
    tiff,
    directory,
    width,
    height,
    tiled,
    blockWidth,
    blockHeight,
    blocksAcross: Math.ceil(width / blockWidth),
    blocksDown: Math.ceil(height / blockHeight),
    compression,
    predictor,
    sampleType,
    littleEndian: tiff.littleEndian,
  };
}

/** Where each block of an image lies in the file; an offset or length of 0 stands for a block of void. */
export interface BlockPlaces {
  readonly offsets: Float64Array;
  readonly lengths: Float64Array;
}

/** @throws OverbrimError `unreadable` when there are not as many places as blocks. */
export async function blockPlaces(layout: ImageLayout): Promise<BlockPlaces> {
  const { tiff, directory, tiled } = layout;
  const expected = layout.blocksAcross * layout.blocksDown;
  const offsetTag = tiled ? tags.tileOffsets : tags.stripOffsets;
  const lengthTag = tiled ? tags.tileByteCounts : tags.stripByteCounts;
  for (const tag of [offsetTag, lengthTag]) {
    const found = directory.entries.get(tag)?.count ?? 0;
    if (found !== expected) {
      throw new OverbrimError(
        'unreadable',
        `${tiff.reader.name} claims ${layout.width} × ${layout.height} cells in ${expected} blocks but tag ${tag} places ${found}; the file is damaged, so write it anew.`,
      );
    }
  }
  return {
    offsets: await numbersOf(tiff, directory, offsetTag),
    lengths: await numbersOf(tiff, directory, lengthTag),
  };
}

function unsupported(message: string): OverbrimError {
  return new OverbrimError('unsupported', message);
}
