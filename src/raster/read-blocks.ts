import { OverbrimError } from '../core/error.ts';
import type { CellRect } from '../core/grid.ts';
import { decodeBlock, readableCompressions } from './decode-block.ts';
import { type BlockPlaces, blockPlaces, type ImageLayout } from './image-layout.ts';
import { cellsBeyondDoubt, cellsPerByte } from './limits.ts';
import { type Samples, sampleBytes, samplesOf } from './sample-type.ts';

/**
 * Checks that the file could hold the cells wanted, before anything is allocated for them.
 * @throws OverbrimError `unreadable` for a small file that claims a huge size or blocks outside the file.
 */
export async function checkedPlaces(layout: ImageLayout, rect: CellRect): Promise<BlockPlaces> {
  const { reader } = layout.tiff;
  const cells = rect.width * rect.height;
  const size = reader.size;
  if (size !== null && cells > cellsBeyondDoubt && cells > size * cellsPerByte) {
    throw new OverbrimError(
      'unreadable',
      `${reader.name} claims ${layout.width} × ${layout.height} cells but has only ${size} bytes; expected far more, so write the file anew.`,
    );
  }
  const places = await blockPlaces(layout);
  const factor = readableCompressions.get(layout.compression) ?? 1;
  for (const block of blocksIn(layout, rect)) {
    const offset = places.offsets[block.index];
    const length = places.lengths[block.index];
    if (offset === 0 || length === 0) continue;
    const what = `the block of row ${block.row}, column ${block.column}`;
    if (size !== null && offset + length > size) throw reader.outside(offset, length, what);
    const unpacked = blockRows(layout, block.row) * layout.blockWidth * sampleBytes[layout.sampleType];
    if (length * factor < unpacked || (layout.compression !== 1 && length > 2 * unpacked + 1024)) {
      throw new OverbrimError(
        'unreadable',
        `${reader.name} claims that ${length} bytes unpack to ${unpacked}; no file written by its method does, so write it anew.`,
      );
    }
  }
  return places;
}

export interface Block {
  readonly index: number;
  readonly column: number;
  readonly row: number;
}

/** The blocks that touch a rectangle, row by row. */
export function* blocksIn(layout: ImageLayout, rect: CellRect): Generator<Block> {
  const lastRow = Math.floor((rect.row + rect.height - 1) / layout.blockHeight);
  const lastColumn = Math.floor((rect.column + rect.width - 1) / layout.blockWidth);
  for (let row = Math.floor(rect.row / layout.blockHeight); row <= lastRow; row++) {
    for (let column = Math.floor(rect.column / layout.blockWidth); column <= lastColumn; column++) {
      yield { index: row * layout.blocksAcross + column, column, row };
    }
  }
}

function blockRows(layout: ImageLayout, blockRow: number): number {
  const { tiled, blockHeight, height } = layout;
  return tiled ? blockHeight : Math.min(blockHeight, height - blockRow * blockHeight);
}

/** Rows of a block that are read: all, or those wanted when nothing is compressed (a strip may be the whole file). */
export function rowsRead(
  layout: ImageLayout,
  block: Block,
  rect: CellRect,
): { first: number; count: number } {
  const all = blockRows(layout, block.row);
  if (layout.compression !== 1) return { first: 0, count: all };
  const top = block.row * layout.blockHeight;
  const first = Math.max(0, rect.row - top);
  return { first, count: Math.min(all, rect.row + rect.height - top) - first };
}

/** The values of one block (of its wanted rows), null for a block of void. */
export async function blockSamples(
  layout: ImageLayout,
  places: BlockPlaces,
  block: Block,
  rect: CellRect,
): Promise<Samples | null> {
  const offset = places.offsets[block.index];
  const length = places.lengths[block.index];
  if (offset === 0 || length === 0) return null;
  const { reader, littleEndian } = layout.tiff;
  const width = sampleBytes[layout.sampleType];
  const rowBytes = layout.blockWidth * width;
  const { first, count } = rowsRead(layout, block, rect);
  const plain = layout.compression === 1;
  const what = `the block of row ${block.row}, column ${block.column}`;
  const data = await reader.logged(
    plain ? offset + first * rowBytes : offset,
    plain ? count * rowBytes : length,
    what,
  );
  const format = {
    name: reader.name,
    compression: layout.compression,
    predictor: layout.predictor,
    rowCells: layout.blockWidth,
    sampleBytes: width,
    littleEndian,
  };
  return samplesOf(await decodeBlock(data, format, count * rowBytes), layout.sampleType, littleEndian);
}
