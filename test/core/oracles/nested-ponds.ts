import { distinctLevels, leavingLevels, pieces, type SmallGrid, touching } from './small-grid.ts';

/** A pond by its definition. */
export interface OraclePond {
  /** Ground lower than the spill elevation, row-major indices ascending. */
  readonly cells: readonly number[];
  readonly spillM: number;
  readonly pitM: number;
  /** Sum of (spill elevation − z) over the cells times the areas of their rows, m³. */
  readonly capacityM3: number;
  /** Position in the list of the smallest pond that holds it, −1 = outermost. */
  readonly parent: number;
}

/**
 * All ponds of a small grid, lowest spill elevation first, then by first cell.
 *
 * A pond with spill elevation s is a connected piece C of {z < s} from which no water leaves below s, while at s it
 * does: the piece of {z ≤ s} that holds C also holds ground lower than s outside C (its water runs there, over rim
 * cells of elevation s exactly), or a cell from which water leaves at s or lower. So where two pieces meet at s both
 * are ponds, and the ground that holds both is one only if it can stand higher than s. Ground without any way to an
 * outlet holds no pond.
 */
export function nestedPonds(grid: SmallGrid, rowAreaM2: ArrayLike<number> | null = null): OraclePond[] {
  const touch = touching(grid);
  const leaving = leavingLevels(grid);
  const stranded = new Set<number>();
  for (const piece of pieces(touch, (cell) => !Number.isNaN(grid.z[cell]))) {
    if (piece.every((cell) => leaving[cell] === Number.POSITIVE_INFINITY)) {
      for (const cell of piece) stranded.add(cell);
    }
  }
  const found: Omit<OraclePond, 'parent'>[] = [];
  for (const s of distinctLevels(grid)) {
    const upTo = pieces(touch, (cell) => grid.z[cell] <= s && !stranded.has(cell));
    for (const cells of pieces(touch, (cell) => grid.z[cell] < s && !stranded.has(cell))) {
      if (cells.some((cell) => leaving[cell] < s)) continue;
      const inside = new Set(cells);
      const around = upTo.find((piece) => piece.includes(cells[0])) ?? [];
      const spills = around.some((cell) => leaving[cell] <= s || (grid.z[cell] < s && !inside.has(cell)));
      if (!spills) continue;
      const pitM = Math.min(...cells.map((cell) => grid.z[cell]));
      found.push({ cells, spillM: s, pitM, capacityM3: capacity(grid, cells, s, rowAreaM2) });
    }
  }
  return found.map((pond, i) => ({
    ...pond,
    // A later pond that holds the first cell holds all: pieces of growing thresholds are nested or apart.
    parent: found.findIndex(
      (other, k) => k > i && other.spillM > pond.spillM && other.cells.includes(pond.cells[0]),
    ),
  }));
}

function capacity(
  grid: SmallGrid,
  cells: readonly number[],
  s: number,
  rowAreaM2: ArrayLike<number> | null,
): number {
  return compensatedSum(
    cells.map(
      (cell) => (s - grid.z[cell]) * (rowAreaM2 === null ? 1 : rowAreaM2[Math.floor(cell / grid.width)]),
    ),
  );
}

/** A sum that keeps what plain addition drops (Neumaier 1974). */
export function compensatedSum(values: readonly number[]): number {
  let sum = 0;
  let dropped = 0;
  for (const value of values) {
    const next = sum + value;
    dropped += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  return sum + dropped;
}
