import { halved } from './halved.ts';
import type { SurveyView } from './survey-view.ts';

/** Ground and leaf of one cell for each block of a halved grid. */
export interface PooledCells {
  readonly width: number;
  readonly height: number;
  readonly groundM: Float32Array;
  readonly leaf: Int32Array;
}

type Cells = Pick<SurveyView, 'width' | 'height' | 'elevationM' | 'leaf'>;

/**
 * Halved grids in which a block stands for its deepest cell, so that a pixel is wet where any cell under it is.
 * Where all are dry the lowest stands. Holds for the levels that it was made with; made level by level when asked.
 */
export class PooledSurvey {
  readonly #levels: PooledCells[];
  readonly #levelM: Float32Array;

  /** @param levelM water level of each leaf, metres, +∞ = none */
  constructor({ width, height, elevationM, leaf }: Cells, levelM: Float32Array) {
    this.#levels = [{ width, height, groundM: elevationM, leaf }];
    this.#levelM = levelM;
  }

  at(halvings: number): PooledCells {
    while (this.#levels.length <= halvings) {
      this.#levels.push(pooled(this.#levels[this.#levels.length - 1], this.#levelM));
    }
    return this.#levels[halvings];
  }
}

function pooled(from: PooledCells, levelM: Float32Array): PooledCells {
  const width = halved(from.width, 1);
  const height = halved(from.height, 1);
  const groundM = new Float32Array(width * height).fill(Number.NaN);
  const leaf = new Int32Array(width * height).fill(-1);
  for (let row = 0; row < height; row++) {
    const lastRow = Math.min(2 * row + 1, from.height - 1);
    for (let column = 0; column < width; column++) {
      const lastColumn = Math.min(2 * column + 1, from.width - 1);
      let best = -1;
      let bestDepth = 0;
      for (let r = 2 * row; r <= lastRow; r++) {
        for (let c = 2 * column; c <= lastColumn; c++) {
          const cell = r * from.width + c;
          const l = from.leaf[cell];
          if (l < 0) continue;
          const level = levelM[l];
          const depth = level < Number.POSITIVE_INFINITY ? Math.max(0, level - from.groundM[cell]) : 0;
          const better =
            best < 0 || depth > bestDepth || (depth === bestDepth && from.groundM[cell] < from.groundM[best]);
          if (better) {
            best = cell;
            bestDepth = depth;
          }
        }
      }
      if (best < 0) continue;
      groundM[row * width + column] = from.groundM[best];
      leaf[row * width + column] = from.leaf[best];
    }
  }
  return { width, height, groundM, leaf };
}
