import { halved } from './halved.ts';

/** A shade a cell, 1 (dark) to 255; 0 = void. */
export interface Shade {
  readonly width: number;
  readonly height: number;
  readonly value: Uint8Array;
}

/** Halved grids of the mean shade of each block, voids left out; made level by level when asked. */
export class PooledShade {
  readonly #levels: Shade[];

  constructor(shade: Shade) {
    this.#levels = [shade];
  }

  at(halvings: number): Shade {
    while (this.#levels.length <= halvings) this.#levels.push(pooled(this.#levels[this.#levels.length - 1]));
    return this.#levels[halvings];
  }
}

function pooled(from: Shade): Shade {
  const width = halved(from.width, 1);
  const height = halved(from.height, 1);
  const value = new Uint8Array(width * height);
  for (let row = 0; row < height; row++) {
    const lastRow = Math.min(2 * row + 1, from.height - 1);
    for (let column = 0; column < width; column++) {
      const lastColumn = Math.min(2 * column + 1, from.width - 1);
      let sum = 0;
      let count = 0;
      for (let r = 2 * row; r <= lastRow; r++) {
        for (let c = 2 * column; c <= lastColumn; c++) {
          const shade = from.value[r * from.width + c];
          if (shade === 0) continue;
          sum += shade;
          count++;
        }
      }
      if (count > 0) value[row * width + column] = Math.round(sum / count);
    }
  }
  return { width, height, value };
}
