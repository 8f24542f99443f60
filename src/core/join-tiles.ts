import { emptySills, type Sills, setSill, spanningForest } from './forest.ts';
import type { Neighbours } from './grid.ts';
import { joinVoid } from './join-void.ts';
import type { RowMetrics } from './metrics.ts';
import { keyHalves, stableOrder } from './order.ts';
import { allocateSurvey, type Survey, viewSurvey } from './survey.ts';
import type { TileSurvey } from './tile-survey.ts';
import type { GridShape } from './tile-window.ts';

/**
 * Joins tile surveys into one. Each tile's labels get a place in one numbering; a provisional label is redirected
 * to the label that its cell has in its own tile, until a pit is reached (ways lead ever downwards, so there is
 * no circle); pits become leaves in row-major order; the tiles' forests together hold the forest of the whole.
 */
export function joinTiles(
  grid: GridShape,
  metrics: RowMetrics,
  neighbours: Neighbours,
  madePits: ArrayLike<number>,
  tileSize: number,
  tiles: readonly TileSurvey[],
): Survey {
  const starts = startsOf(tiles.map((tile) => tile.cells.length));
  const leafOf = leavesOf(grid, tileSize, tiles, starts);
  const sills = joinedSills(tiles, starts, leafOf.leaf);
  const kept = spanningForest(leafOf.count, sills);
  const rim = lowestPerLeaf(tiles, starts, leafOf.leaf);
  const voids = joinVoid(tiles, starts, leafOf.leaf);
  const { buffer, sections } = allocateSurvey(
    { width: grid.width, height: grid.height, neighbours, wraps: grid.wraps, leaves: leafOf.count },
    {
      madePits: madePits.length,
      sills: kept.length,
      rim: rim.length,
      voids: voids.onRim.length,
      beside: voids.beside.length,
    },
  );
  sections.madePits.set(madePits);
  kept.forEach((at, i) => {
    sections.elevationM[i] = sills.elevationM[at];
    sections.sillCell[i] = sills.sillCell[at];
    sections.otherCell[i] = sills.otherCell[at];
    sections.sillLeaf[i] = sills.sillLeaf[at];
    sections.otherLeaf[i] = sills.otherLeaf[at];
  });
  rim.forEach(({ leaf, cell, elevationM }, i) => {
    sections.rimLeaf[i] = leaf;
    sections.rimCell[i] = cell;
    sections.rimElevationM[i] = elevationM;
  });
  sections.voidOnRim.set(voids.onRim);
  sections.voidIsGap.set(voids.isGap);
  sections.voidCells.set(voids.cells);
  voids.beside.forEach(({ leaf, piece, cell, elevationM }, i) => {
    sections.besideLeaf[i] = leaf;
    sections.besidePiece[i] = piece;
    sections.besideCell[i] = cell;
    sections.besideElevationM[i] = elevationM;
  });
  fillLeaves(grid, metrics, tiles, starts, leafOf.leaf, sections);
  return viewSurvey(buffer);
}

/** Running totals: where each part starts in one numbering, and the whole as the last. */
function startsOf(lengths: readonly number[]): Int32Array {
  const starts = new Int32Array(lengths.length + 1);
  lengths.forEach((length, i) => {
    starts[i + 1] = starts[i] + length;
  });
  return starts;
}

/** Leaf of each label of each tile. */
function leavesOf(
  grid: GridShape,
  tileSize: number,
  tiles: readonly TileSurvey[],
  starts: Int32Array,
): { leaf: Int32Array; count: number } {
  const across = Math.ceil(grid.width / tileSize);
  const towards = new Int32Array(starts[tiles.length]).fill(-1);
  let pits = 0;
  tiles.forEach((tile, t) => {
    pits += tile.pitCell.length;
    for (let i = 0; i < tile.haloCell.length; i++) {
      const cell = tile.haloCell[i];
      const row = Math.floor(cell / grid.width);
      const column = cell - row * grid.width;
      const owner = Math.floor(row / tileSize) * across + Math.floor(column / tileSize);
      const [left, top, width] = tiles[owner].place;
      const label = tiles[owner].label[(row - top) * width + column - left];
      towards[starts[t] + tile.pitCell.length + i] = starts[owner] + label;
    }
  });
  const cells = new Float64Array(pits);
  const places = new Int32Array(pits);
  let n = 0;
  tiles.forEach((tile, t) => {
    for (let p = 0; p < tile.pitCell.length; p++) {
      cells[n] = tile.pitCell[p];
      places[n++] = starts[t] + p;
    }
  });
  const leaf = new Int32Array(towards.length);
  stableOrder(pits, keyHalves(cells)).forEach((at, i) => {
    leaf[places[at]] = i;
  });
  for (let i = 0; i < towards.length; i++) {
    let end = i;
    while (towards[end] >= 0) end = towards[end];
    for (let at = i; towards[at] >= 0; ) {
      const next = towards[at];
      towards[at] = end;
      at = next;
    }
    leaf[i] = leaf[end];
  }
  return { leaf, count: pits };
}

/** The sills of all tiles that still lie between two leaves, and the passes over rows that lie on a pole. */
function joinedSills(tiles: readonly TileSurvey[], starts: Int32Array, leaf: Int32Array): Sills {
  const poles = polePasses(tiles, starts, leaf);
  let most = poles.length;
  for (const tile of tiles) most += tile.sillCell.length;
  const sills = emptySills(most);
  let count = 0;
  tiles.forEach((tile, t) => {
    for (let s = 0; s < tile.sillCell.length; s++) {
      const a = leaf[starts[t] + tile.sillLabel[s]];
      const b = leaf[starts[t] + tile.otherLabel[s]];
      if (a !== b) setSill(sills, count++, tile.sillElevationM[s], tile.sillCell[s], tile.otherCell[s], a, b);
    }
  });
  for (const { from, to } of poles) {
    setSill(sills, count++, from.elevationM, from.cell, to.cell, from.leaf, to.leaf);
  }
  return {
    elevationM: sills.elevationM.subarray(0, count),
    sillCell: sills.sillCell.subarray(0, count),
    otherCell: sills.otherCell.subarray(0, count),
    sillLeaf: sills.sillLeaf.subarray(0, count),
    otherLeaf: sills.otherLeaf.subarray(0, count),
  };
}

/** A leaf's lowest cell among some. */
export interface LowestCell {
  readonly leaf: number;
  readonly cell: number;
  readonly elevationM: number;
}

/** All cells of a row on a pole touch each other: each leaf's lowest there is joined to the lowest of all. */
function polePasses(
  tiles: readonly TileSurvey[],
  starts: Int32Array,
  leaf: Int32Array,
): { from: LowestCell; to: LowestCell }[] {
  const passes: { from: LowestCell; to: LowestCell }[] = [];
  for (const pole of [0, 1]) {
    const held = new Map<number, LowestCell>();
    tiles.forEach((tile, t) => {
      tile.poleCell.forEach((cell, i) => {
        if (tile.pole[i] !== pole) return;
        takeLower(held, leaf[starts[t] + tile.poleLabel[i]], cell, tile.poleElevationM[i]);
      });
    });
    const ordered = [...held.values()].sort((a, b) => a.elevationM - b.elevationM || a.cell - b.cell);
    for (const from of ordered.slice(1)) passes.push({ from, to: ordered[0] });
  }
  return passes;
}

function lowestPerLeaf(tiles: readonly TileSurvey[], starts: Int32Array, leaf: Int32Array): LowestCell[] {
  const held = new Map<number, LowestCell>();
  tiles.forEach((tile, t) => {
    tile.rimCell.forEach((cell, i) => {
      takeLower(held, leaf[starts[t] + tile.rimLabel[i]], cell, tile.rimElevationM[i]);
    });
  });
  return [...held.values()].sort((a, b) => a.leaf - b.leaf);
}

function takeLower(held: Map<number, LowestCell>, leaf: number, cell: number, elevationM: number): void {
  const other = held.get(leaf);
  if (
    other === undefined ||
    elevationM < other.elevationM ||
    (elevationM === other.elevationM && cell < other.cell)
  ) {
    held.set(leaf, { leaf, cell, elevationM });
  }
}

/** Writes pits, sizes and the leaf of each cell. */
function fillLeaves(
  grid: GridShape,
  metrics: RowMetrics,
  tiles: readonly TileSurvey[],
  starts: Int32Array,
  leaf: Int32Array,
  out: Pick<Survey, 'leaf' | 'pitCell' | 'pitElevationM' | 'cells' | 'areaM2'>,
): void {
  const areaLowM2 = new Float64Array(metrics.uniform ? 0 : out.areaM2.length);
  tiles.forEach((tile, t) => {
    const start = starts[t];
    for (let p = 0; p < tile.pitCell.length; p++) {
      out.pitCell[leaf[start + p]] = tile.pitCell[p];
      out.pitElevationM[leaf[start + p]] = tile.pitElevationM[p];
    }
    for (let l = 0; l < tile.cells.length; l++) {
      out.cells[leaf[start + l]] += tile.cells[l];
      if (metrics.uniform) continue;
      out.areaM2[leaf[start + l]] += tile.areaHighM2[l];
      areaLowM2[leaf[start + l]] += tile.areaLowM2[l];
    }
    const [left, top, width, height] = tile.place;
    const { label } = tile;
    const leafOfCell = out.leaf;
    for (let r = 0; r < height; r++) {
      const to = (top + r) * grid.width + left;
      const from = r * width;
      for (let c = 0; c < width; c++) {
        const l = label[from + c];
        leafOfCell[to + c] = l < 0 ? -1 : leaf[start + l];
      }
    }
  });
  for (let l = 0; l < out.areaM2.length; l++) {
    out.areaM2[l] = metrics.uniform ? out.cells[l] * metrics.areaM2[0] : out.areaM2[l] + areaLowM2[l];
  }
}
