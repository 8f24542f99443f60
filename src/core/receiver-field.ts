import type { Grid, Neighbours } from './grid.ts';
import { receiverRoom } from './receiver-room.ts';
import { receiversOf } from './receivers.ts';
import { cellAt, shapeOf, type Tile, tileWindow } from './tile-window.ts';

const side = 32;

/**
 * Receivers of single cells, worked out block by block when asked for: a survey does not keep them. The same pass
 * as the survey's, so the same answers.
 */
export class ReceiverField {
  readonly #grid: Grid;
  readonly #neighbours: Neighbours;
  readonly #madePits: ArrayLike<number>;
  readonly #room = receiverRoom((side + 2) * (side + 2));
  readonly #blocks = new Map<number, Float64Array>();

  constructor(grid: Grid, neighbours: Neighbours, madePits: ArrayLike<number>) {
    this.#grid = grid;
    this.#neighbours = neighbours;
    this.#madePits = madePits;
  }

  /** Row-major index of the receiver, or the cell itself when it is a pit or a void. */
  receiver(cell: number): number {
    const { width } = this.#grid;
    const row = Math.floor(cell / width);
    const column = cell - row * width;
    const top = row - (row % side);
    const left = column - (column % side);
    const key = top * width + left;
    let block = this.#blocks.get(key);
    if (block === undefined) {
      block = this.#receiversOfBlock(left, top);
      this.#blocks.set(key, block);
    }
    return block[(row - top) * Math.min(side, width - left) + column - left];
  }

  #receiversOfBlock(column: number, row: number): Float64Array {
    const grid = this.#grid;
    const shape = shapeOf(grid);
    const tile: Tile = {
      column,
      row,
      width: Math.min(side, grid.width - column),
      height: Math.min(side, grid.height - row),
    };
    const { to } = receiversOf(tileWindow(grid, tile, this.#neighbours, this.#madePits), this.#room);
    const block = new Float64Array(tile.width * tile.height);
    for (let r = 0; r < tile.height; r++) {
      for (let c = 0; c < tile.width; c++) {
        const receiver = to[(r + 1) * (tile.width + 2) + c + 1];
        block[r * tile.width + c] =
          receiver < 0 ? (row + r) * grid.width + column + c : cellAt(receiver, tile, shape);
      }
    }
    return block;
  }
}
