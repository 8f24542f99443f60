/** A small grid for the oracles, which are written only for tests: plain and slow, nothing taken from `src`. */
export interface SmallGrid {
  readonly width: number;
  readonly height: number;
  /** `height × width`, row-major, metres, NaN = void. */
  readonly z: Float32Array;
  readonly neighbours: 4 | 8;
  /** First and last column touch. */
  readonly wraps: boolean;
  /** Rows whose cells are one place (they lie exactly on a pole) and so all touch each other. */
  readonly onePlaceRows?: readonly number[];
  /** Cells from which water leaves at max(levelM, z); on void they do nothing. */
  readonly outlets: readonly SmallOutlet[];
}

export interface SmallOutlet {
  readonly cell: number;
  /** −∞ where the ground alone decides. */
  readonly levelM: number;
}

/** For each cell the cells that touch it and are no void, ascending; none for a void. */
export function touching(grid: SmallGrid): number[][] {
  const { width, height, z, neighbours, wraps, onePlaceRows = [] } = grid;
  const all: number[][] = [];
  for (let cell = 0; cell < width * height; cell++) {
    const beside = new Set<number>();
    const row = Math.floor(cell / width);
    const column = cell % width;
    for (let dr = -1; dr <= 1; dr++) {
      for (let dc = -1; dc <= 1; dc++) {
        if (neighbours === 4 && dr !== 0 && dc !== 0) continue;
        const r = row + dr;
        const c = wraps ? (column + dc + width) % width : column + dc;
        if (r >= 0 && r < height && c >= 0 && c < width) beside.add(r * width + c);
      }
    }
    if (onePlaceRows.includes(row)) for (let c = 0; c < width; c++) beside.add(row * width + c);
    beside.delete(cell);
    const ground = [...beside].filter((other) => !Number.isNaN(z[other]));
    all.push(Number.isNaN(z[cell]) ? [] : ground.sort((a, b) => a - b));
  }
  return all;
}

/** The lowest level at which water leaves straight from each cell; +∞ where it is no outlet. */
export function leavingLevels(grid: SmallGrid): Float64Array {
  const leaving = new Float64Array(grid.z.length).fill(Number.POSITIVE_INFINITY);
  for (const { cell, levelM } of grid.outlets) {
    if (Number.isNaN(grid.z[cell])) continue;
    leaving[cell] = Math.min(leaving[cell], Math.max(levelM, grid.z[cell]));
  }
  return leaving;
}

/** Elevations and outlet levels that occur, each once, ascending. */
export function distinctLevels(grid: SmallGrid): number[] {
  const levels = [...grid.z, ...leavingLevels(grid)].filter((level) => Number.isFinite(level));
  return [...new Set(levels.map((level) => level + 0))].sort((a, b) => a - b);
}

/** The connected pieces of the cells that `belongs` accepts, each with its cells ascending, by their first cell. */
export function pieces(touch: readonly number[][], belongs: (cell: number) => boolean): number[][] {
  const seen = new Set<number>();
  const found: number[][] = [];
  for (let first = 0; first < touch.length; first++) {
    if (seen.has(first) || !belongs(first)) continue;
    const piece = [first];
    seen.add(first);
    for (let i = 0; i < piece.length; i++) {
      for (const other of touch[piece[i]]) {
        if (seen.has(other) || !belongs(other)) continue;
        seen.add(other);
        piece.push(other);
      }
    }
    found.push(piece.sort((a, b) => a - b));
  }
  return found;
}
