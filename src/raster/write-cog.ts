import { zlibSync } from 'fflate';
import { OverbrimError } from '../core/error.ts';
import { bandMetadata } from './band-metadata.ts';
import { geoTags, keysSayPoint } from './geo-tags.ts';
import { type OverviewRule, pyramid } from './overviews.ts';
import type { Level, RasterOut, Samples } from './raster-out.ts';
import { type Directory, type Field, headBytes, headSize } from './tiff-layout.ts';
import { tileBytes } from './tile-bytes.ts';

export interface CogOptions {
  /** Side of a tile in cells, a multiple of 16 (default 512); smaller rasters get smaller tiles. */
  readonly tileSize?: number;
  /** How cells are merged in overviews (default `mean` for floats, `nearest` for integers). */
  readonly overviews?: OverviewRule;
  /** Told the share of tiles done, 0 to 1; what it throws ends the writing. */
  readonly progress?: (fraction: number) => void;
}

/** Fixed, so that the same raster gives the same bytes everywhere. */
const deflateLevel = 6;

/** Offsets of a classic TIFF have 32 bits. */
const greatestSize = 2 ** 32 - 1;

/**
 * A raster as the bytes of a cloud optimized GeoTIFF (OGC 21-026; TIFF 6.0; OGC GeoTIFF 1.1):
 * little-endian, all directories first, the full resolution first among them; every one tiled; data of the
 * smallest overview first; deflate in zlib form (compression 8), predictor 3 for floats and 2 for integers.
 * The no-data value stands in tag 42113, unit and statistics in tag 42112. The same raster gives the same bytes.
 * @throws OverbrimError `bad-input` for shapes, values or options that do not fit, `too-large` beyond 4 GB.
 */
export function cloudOptimizedGeoTiff(raster: RasterOut, options: CogOptions = {}): Uint8Array {
  const tileSize = options.tileSize ?? 512;
  check(raster, tileSize);
  const isFloat = raster.samples instanceof Float32Array;
  const rule = options.overviews ?? (isFloat ? 'mean' : 'nearest');
  const tileWidth = Math.min(tileSize, nextMultipleOf16(raster.width));
  const tileHeight = Math.min(tileSize, nextMultipleOf16(raster.height));
  const levels = pyramid(raster, tileWidth, tileHeight, rule, raster.noData);
  const tiles = compressedTiles(levels, tileWidth, tileHeight, options.progress);
  const tags = levels.map((level, i) => {
    const directory = levelTags(level, i > 0, tileWidth, tileHeight, raster.noData);
    directory.set(324, { type: 'long', values: new Float64Array(tiles[i].length) });
    directory.set(325, { type: 'long', values: tiles[i].map((tile) => tile.length) });
    return directory;
  });
  for (const [tag, field] of geoTags(raster.georeference)) tags[0].set(tag, field);
  tags[0].set(42112, text(bandMetadata(raster)));
  return joined(tags, tiles);
}

function compressedTiles(
  levels: readonly Level[],
  tileWidth: number,
  tileHeight: number,
  progress: CogOptions['progress'],
): Uint8Array[][] {
  const across = levels.map((level) => Math.ceil(level.width / tileWidth));
  const down = levels.map((level) => Math.ceil(level.height / tileHeight));
  const total = levels.reduce((sum, _, i) => sum + across[i] * down[i], 0);
  let done = 0;
  return levels.map((level, i) => {
    const tiles: Uint8Array[] = [];
    for (let row = 0; row < down[i]; row++) {
      for (let column = 0; column < across[i]; column++) {
        const bytes = tileBytes(level, column, row, tileWidth, tileHeight);
        tiles.push(zlibSync(bytes, { level: deflateLevel }));
        progress?.(++done / total);
      }
    }
    return tiles;
  });
}

/** Tags that each directory has of its own (numbers of TIFF 6.0, predictor 3 of Technical Note 3). */
function levelTags(
  level: Level,
  isOverview: boolean,
  tileWidth: number,
  tileHeight: number,
  noData: number | null,
): Map<number, Field> {
  const isFloat = level.samples instanceof Float32Array;
  const tags = new Map<number, Field>([
    [254, { type: 'long', values: [isOverview ? 1 : 0] }],
    [256, { type: 'long', values: [level.width] }],
    [257, { type: 'long', values: [level.height] }],
    [258, short(8 * level.samples.BYTES_PER_ELEMENT)],
    [259, short(8)],
    [262, short(1)],
    [277, short(1)],
    [284, short(1)],
    [317, short(isFloat ? 3 : 2)],
    [322, short(tileWidth)],
    [323, short(tileHeight)],
    [339, short(isFloat ? 3 : 1)],
  ]);
  if (noData !== null) tags.set(42113, text(Number.isNaN(noData) ? 'nan' : `${noData}`));
  return tags;
}

/** Places the data behind the directories, smallest level first, and writes the offsets into them. */
function joined(tags: Map<number, Field>[], tiles: readonly Uint8Array[][]): Uint8Array {
  let at = headSize(tags);
  for (let i = tags.length - 1; i >= 0; i--) {
    const offsets = tiles[i].map((tile) => {
      const offset = at;
      at += tile.length;
      return offset;
    });
    tags[i].set(324, { type: 'long', values: offsets });
  }
  if (at > greatestSize) {
    throw new OverbrimError(
      'too-large',
      `The raster takes ${at} bytes compressed and a classic TIFF ends at ${greatestSize}; write it in parts.`,
    );
  }
  const head = headBytes(tags as readonly Directory[]);
  const bytes = new Uint8Array(at);
  bytes.set(head);
  at = head.length;
  for (let i = tiles.length - 1; i >= 0; i--) {
    for (const tile of tiles[i]) {
      bytes.set(tile, at);
      at += tile.length;
    }
  }
  return bytes;
}

function check(raster: RasterOut, tileSize: number): void {
  const { width, height, samples, noData, georeference } = raster;
  if (!(Number.isInteger(width) && Number.isInteger(height) && width > 0 && height > 0)) {
    throw new OverbrimError(
      'bad-input',
      `A raster of ${width} × ${height} cells was given; both sides must be whole numbers of at least 1.`,
    );
  }
  if (samples.length !== width * height) {
    throw new OverbrimError(
      'bad-input',
      `${samples.length} samples were given for ${width} × ${height} cells; expected ${width * height}, row by row.`,
    );
  }
  if (!(Number.isInteger(tileSize) && tileSize >= 16 && tileSize % 16 === 0 && tileSize <= 4096)) {
    throw new OverbrimError(
      'bad-input',
      `A tile size of ${tileSize} was given; give a multiple of 16 from 16 to 4096.`,
    );
  }
  if (noData !== null && !fits(noData, samples)) {
    throw new OverbrimError(
      'bad-input',
      `The no-data value ${noData} cannot be stored in a ${samples.constructor.name}; give one of its values or null.`,
    );
  }
  if (keysSayPoint(georeference.geoKeys) !== georeference.pixelIsPoint) {
    throw new OverbrimError(
      'bad-input',
      `The georeference has pixelIsPoint ${georeference.pixelIsPoint}, its key 1025 says the contrary; make them agree.`,
    );
  }
}

function fits(value: number, samples: Samples): boolean {
  if (samples instanceof Float32Array) return Number.isNaN(value) || Math.fround(value) === value;
  const greatest = samples instanceof Uint32Array ? 2 ** 32 - 1 : 255;
  return Number.isInteger(value) && value >= 0 && value <= greatest;
}

function nextMultipleOf16(length: number): number {
  return Math.ceil(length / 16) * 16;
}

function short(value: number): Field {
  return { type: 'short', values: [value] };
}

function text(value: string): Field {
  return { type: 'ascii', bytes: new TextEncoder().encode(`${value}\0`) };
}
