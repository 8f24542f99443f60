import { keyHalves, orderedKeys, stableOrder } from './order.ts';
import { UnionFind } from './union-find.ts';

/** Passes between catchments (or between a catchment and the outside), struct of arrays of one length. */
export interface Sills {
  /** Elevation of the pass, float32 metres. */
  readonly elevationM: Float32Array;
  /** The higher of the two cells that touch, and the other; row-major. −1 = outside. */
  readonly sillCell: Float64Array;
  readonly otherCell: Float64Array;
  /** Catchments (leaves) of the two cells. */
  readonly sillLeaf: Int32Array;
  readonly otherLeaf: Int32Array;
}

/** Positions of sills in their total order. */
export function sillOrder(sills: Sills): Uint32Array {
  return stableOrder(sills.elevationM.length, [
    ...keyHalves(sills.otherCell),
    ...keyHalves(sills.sillCell),
    orderedKeys(sills.elevationM),
  ]);
}

/** Minimum spanning forest by Kruskal (1956): positions of the kept sills, lowest first. */
export function spanningForest(leaves: number, sills: Sills): Uint32Array {
  const order = sillOrder(sills);
  const sets = new UnionFind(leaves);
  let kept = 0;
  for (const at of order) {
    const a = sets.root(sills.sillLeaf[at]);
    const b = sets.root(sills.otherLeaf[at]);
    if (a === b) continue;
    sets.join(a, b);
    order[kept++] = at;
  }
  return order.slice(0, kept);
}

/** Room for `count` sills. */
export function emptySills(count: number): Sills {
  return {
    elevationM: new Float32Array(count),
    sillCell: new Float64Array(count),
    otherCell: new Float64Array(count),
    sillLeaf: new Int32Array(count),
    otherLeaf: new Int32Array(count),
  };
}

/** Writes one sill. */
export function setSill(
  sills: Sills,
  at: number,
  elevationM: number,
  sillCell: number,
  otherCell: number,
  sillLeaf: number,
  otherLeaf: number,
): void {
  sills.elevationM[at] = elevationM;
  sills.sillCell[at] = sillCell;
  sills.otherCell[at] = otherCell;
  sills.sillLeaf[at] = sillLeaf;
  sills.otherLeaf[at] = otherLeaf;
}
