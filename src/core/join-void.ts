import type { TileSurvey } from './tile-survey.ts';
import { UnionFind } from './union-find.ts';

/** Pieces of void of the whole grid, and where leaves touch them. */
export interface JoinedVoid {
  readonly onRim: Uint8Array;
  readonly isGap: Uint8Array;
  readonly cells: Float64Array;
  readonly beside: readonly { leaf: number; piece: number; cell: number; elevationM: number }[];
}

/**
 * Pieces of two tiles that share a void cell are one. Pieces of the whole are numbered by their first cell in row
 * order, which no tiling changes.
 */
export function joinVoid(tiles: readonly TileSurvey[], starts: Int32Array, leaf: Int32Array): JoinedVoid {
  let total = 0;
  const firsts = tiles.map((tile) => {
    const first = total;
    total += tile.voidOnRim.length;
    return first;
  });
  const sets = new UnionFind(total);
  const seen = new Map<number, number>();
  tiles.forEach((tile, t) => {
    tile.sharedVoidCell.forEach((cell, i) => {
      const piece = sets.root(firsts[t] + tile.sharedVoidPiece[i]);
      const other = seen.get(cell);
      if (other === undefined) seen.set(cell, piece);
      else sets.join(sets.root(other), piece);
    });
  });
  const roots = new Map<number, { first: number; onRim: number; isGap: number; cells: number }>();
  tiles.forEach((tile, t) => {
    tile.voidFirstCell.forEach((first, p) => {
      const root = sets.root(firsts[t] + p);
      const held = roots.get(root) ?? { first, onRim: 0, isGap: tile.voidIsGap[p], cells: 0 };
      held.first = Math.min(held.first, first);
      held.onRim |= tile.voidOnRim[p];
      held.cells += tile.voidCells[p];
      roots.set(root, held);
    });
  });
  const ordered = [...roots].sort(([, a], [, b]) => a.first - b.first);
  const number = new Map(ordered.map(([root], i) => [root, i]));
  const lowest = new Map<number, JoinedVoid['beside'][number]>();
  tiles.forEach((tile, t) => {
    tile.besideCell.forEach((cell, i) => {
      const piece = number.get(sets.root(firsts[t] + tile.besidePiece[i])) ?? 0;
      const of = leaf[starts[t] + tile.besideLabel[i]];
      const elevationM = tile.besideElevationM[i];
      const key = of * ordered.length + piece;
      const held = lowest.get(key);
      if (
        held === undefined ||
        elevationM < held.elevationM ||
        (elevationM === held.elevationM && cell < held.cell)
      ) {
        lowest.set(key, { leaf: of, piece, cell, elevationM });
      }
    });
  });
  return {
    onRim: Uint8Array.from(ordered, ([, piece]) => piece.onRim),
    isGap: Uint8Array.from(ordered, ([, piece]) => piece.isGap),
    cells: Float64Array.from(ordered, ([, piece]) => piece.cells),
    beside: [...lowest.values()].sort((a, b) => a.leaf - b.leaf || a.piece - b.piece),
  };
}
