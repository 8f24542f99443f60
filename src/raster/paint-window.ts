import type { CellRect } from '../core/grid.ts';
import type { ValueMeaning } from './cell-values.ts';
import type { BlockPlaces, ImageLayout } from './image-layout.ts';
import { type Block, blockSamples, blocksIn, rowsRead } from './read-blocks.ts';
import { type Samples, sampleBytes } from './sample-type.ts';

/** Where cells are painted: row-major elevations in metres, NaN = void. */
export interface Canvas {
  readonly elevationM: Float32Array;
  readonly width: number;
  /** Canvas column and row of the image's cell (0, 0); may be negative. */
  readonly column: number;
  readonly row: number;
}

/** Turns a scaled value into metres of height: `metresPerUnit`, negative where values are depths. */
export interface Painting {
  readonly meaning: ValueMeaning;
  readonly metresPerUnit: number;
}

/**
 * Paints a rectangle of an image, block by block, on those cells of the canvas that are still void.
 * `done` is told the number of cells painted with each block.
 */
export async function paintWindow(
  layout: ImageLayout,
  places: BlockPlaces,
  rect: CellRect,
  canvas: Canvas,
  painting: Painting,
  done: (cells: number) => void = () => {},
): Promise<void> {
  for (const band of bandsOf(layout, rect)) {
    await paintBand(layout, places, band, canvas, painting);
    done(band.width * band.height);
  }
}

/** Rows that are read in one go: of packed blocks a row of blocks, of plain ones about 16 MB, however long a strip is. */
function* bandsOf(layout: ImageLayout, rect: CellRect): Generator<CellRect> {
  const rowBytes = layout.blockWidth * layout.blocksAcross * sampleBytes[layout.sampleType];
  const plain = Math.max(1, Math.floor(2 ** 24 / rowBytes));
  const end = rect.row + rect.height;
  for (let row = rect.row; row < end; ) {
    const blockEnd = (Math.floor(row / layout.blockHeight) + 1) * layout.blockHeight;
    const next = Math.min(end, layout.compression === 1 ? row + plain : blockEnd);
    yield { ...rect, row, height: next - row };
    row = next;
  }
}

async function paintBand(
  layout: ImageLayout,
  places: BlockPlaces,
  rect: CellRect,
  canvas: Canvas,
  painting: Painting,
): Promise<void> {
  const queue: Promise<Samples | null>[] = [];
  const blocks = [...blocksIn(layout, rect)];
  // Reads run a few blocks ahead, so that a distant server's delay is paid once.
  const ahead = 6;
  for (let i = 0; i < blocks.length; i++) {
    for (let k = queue.length; k < Math.min(blocks.length, i + ahead); k++) {
      const samples = blockSamples(layout, places, blocks[k], rect);
      samples.catch(() => {});
      queue.push(samples);
    }
    const samples = await queue[i];
    queue[i] = Promise.resolve(null);
    if (samples) paintBlock(layout, blocks[i], samples, rect, canvas, painting);
  }
}

function paintBlock(
  layout: ImageLayout,
  block: Block,
  samples: Samples,
  rect: CellRect,
  canvas: Canvas,
  { meaning, metresPerUnit }: Painting,
): void {
  const { scale, offset, noData } = meaning;
  const { elevationM } = canvas;
  const left = block.column * layout.blockWidth;
  const { first, count } = rowsRead(layout, block, rect);
  const top = block.row * layout.blockHeight + first;
  const fromColumn = Math.max(rect.column, left);
  const toColumn = Math.min(rect.column + rect.width, left + layout.blockWidth);
  const fromRow = Math.max(rect.row, top);
  const toRow = Math.min(rect.row + rect.height, top + count);
  for (let row = fromRow; row < toRow; row++) {
    let from = (row - top) * layout.blockWidth + fromColumn - left;
    let to = (row + canvas.row) * canvas.width + fromColumn + canvas.column;
    for (let column = fromColumn; column < toColumn; column++, from++, to++) {
      const value = samples[from];
      if (value === noData || Number.isNaN(value) || !Number.isNaN(elevationM[to])) continue;
      elevationM[to] = (value * scale + offset) * metresPerUnit;
    }
  }
}
