import { cellsOfPole, distanceM, neighboursOf } from './cell-steps.ts';
import type { Grid, Neighbours } from './grid.ts';

/**
 * The shortest way from one cell to another through cells that `allows`, both ends included, as row-major indices;
 * undefined when there is none. A* (Hart, Nilsson & Raphael 1968) with the straight distance by the smallest cell
 * sizes of the grid; equal ways are settled by the cells' indices.
 */
export function shortestWay(
  grid: Grid,
  neighbours: Neighbours,
  from: number,
  to: number,
  allows: (cell: number) => boolean,
): number[] | undefined {
  const remaining = leastDistance(grid, neighbours, to);
  const distance = new Map<number, number>([[from, 0]]);
  const before = new Map<number, number>();
  const settled = new Set<number>();
  const poles = new Set<number>();
  const queue = new Queue();
  queue.push(remaining(from), from);
  for (let cell = queue.pop(); cell !== undefined; cell = queue.pop()) {
    if (settled.has(cell)) continue;
    settled.add(cell);
    if (cell === to) return wayBack(before, to);
    const sofar = distance.get(cell) ?? 0;
    const near = neighboursOf(grid, neighbours, cell);
    const pole = poles.has(cell) ? [] : cellsOfPole(grid, cell);
    // The first cell of a pole reaches all others at no distance, so the others need not look again.
    for (const other of pole) {
      poles.add(other);
      if (other !== cell && !near.includes(other)) near.push(other);
    }
    for (const next of near) {
      if (settled.has(next) || (next !== to && !allows(next))) continue;
      const length = sofar + distanceM(grid, cell, next);
      const known = distance.get(next);
      if (known !== undefined && (known < length || (known === length && (before.get(next) ?? 0) <= cell))) {
        continue;
      }
      distance.set(next, length);
      before.set(next, cell);
      queue.push(length + remaining(next), next);
    }
  }
  return undefined;
}

function wayBack(before: Map<number, number>, to: number): number[] {
  const way = [to];
  for (let cell = before.get(to); cell !== undefined; cell = before.get(cell)) way.push(cell);
  return way.reverse();
}

/** A lower bound of the distance that remains, never too long. */
function leastDistance(grid: Grid, neighbours: Neighbours, to: number): (cell: number) => number {
  const { width, metrics, frame } = grid;
  // A hair shorter than true, so that rounding cannot make the bound too long.
  const hair = 1 - 1e-9;
  const east =
    metrics.eastM.reduce((least, value) => Math.min(least, value), Number.POSITIVE_INFINITY) * hair;
  const south =
    metrics.southM.reduce((least, value) => Math.min(least, value), Number.POSITIVE_INFINITY) * hair;
  const diagonal = neighbours === 8 ? Math.sqrt(east * east + south * south) : east + south;
  const toRow = Math.floor(to / width);
  const toColumn = to - toRow * width;
  return (cell) => {
    const row = Math.floor(cell / width);
    const rows = Math.abs(row - toRow);
    let columns = Math.abs(cell - row * width - toColumn);
    if (frame.wraps) columns = Math.min(columns, width - columns);
    const both = Math.min(rows, columns);
    return both * diagonal + (columns - both) * east + (rows - both) * south;
  };
}

/** A binary heap of cells by (priority, cell). */
class Queue {
  readonly #priority: number[] = [];
  readonly #cell: number[] = [];

  push(priority: number, cell: number): void {
    let at = this.#cell.push(cell) - 1;
    this.#priority.push(priority);
    while (at > 0) {
      const up = (at - 1) >> 1;
      if (!this.#less(at, up)) break;
      this.#swap(at, up);
      at = up;
    }
  }

  pop(): number | undefined {
    const first = this.#cell[0];
    const last = this.#cell.length - 1;
    if (last < 0) return undefined;
    this.#swap(0, last);
    this.#cell.pop();
    this.#priority.pop();
    let at = 0;
    for (;;) {
      const left = 2 * at + 1;
      if (left >= last) break;
      const child = left + 1 < last && this.#less(left + 1, left) ? left + 1 : left;
      if (!this.#less(child, at)) break;
      this.#swap(child, at);
      at = child;
    }
    return first;
  }

  #less(a: number, b: number): boolean {
    const d = this.#priority[a] - this.#priority[b];
    return d < 0 || (d === 0 && this.#cell[a] < this.#cell[b]);
  }

  #swap(a: number, b: number): void {
    [this.#priority[a], this.#priority[b]] = [this.#priority[b], this.#priority[a]];
    [this.#cell[a], this.#cell[b]] = [this.#cell[b], this.#cell[a]];
  }
}
