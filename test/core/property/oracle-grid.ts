import type { SmallGrid, SmallOutlet } from '../oracles/small-grid.ts';
import { cellsOfGap, type TerrainCase } from './terrain-case.ts';

/** A case as the oracles take it: every cell from which water leaves, found cell by cell from the rules' wording. */
export function oracleGrid(terrain: TerrainCase): SmallGrid {
  const { width, height, neighbours, wraps, north, south } = terrain;
  const onePlaceRows = [...(north === 'pole-row' ? [0] : []), ...(south === 'pole-row' ? [height - 1] : [])];
  const z = Float32Array.from(terrain.z, (value) => value + 0);
  return { width, height, z, neighbours, wraps, onePlaceRows, outlets: outletsOf(terrain) };
}

/** Cells from which water leaves: over the rim, into voids that drain, and the named ones. */
export function outletsOf(terrain: TerrainCase): SmallOutlet[] {
  const { z, edges, outlets, edgeLevelM, voidLevelM } = terrain;
  const found: SmallOutlet[] = outlets.filter(({ cell }) => !Number.isNaN(z[cell]));
  const open = drainingVoids(terrain);
  for (let cell = 0; cell < z.length; cell++) {
    if (Number.isNaN(z[cell])) continue;
    if (edges === 'open' && isOnRim(terrain, cell)) found.push({ cell, levelM: edgeLevelM });
    if (around(terrain, cell, terrain.neighbours).some((other) => open.has(other))) {
      found.push({ cell, levelM: voidLevelM });
    }
  }
  return found;
}

/** Whether nothing is known beyond one of the cell's sides. */
export function isOnRim({ width, height, wraps, north, south }: TerrainCase, cell: number): boolean {
  const row = Math.floor(cell / width);
  const column = cell % width;
  if (row === 0 && north === 'beyond') return true;
  if (row === height - 1 && south === 'beyond') return true;
  return !wraps && (column === 0 || column === width - 1);
}

/** Neighbours inside the grid, voids included. */
export function around(
  { width, height, wraps }: Pick<TerrainCase, 'width' | 'height' | 'wraps'>,
  cell: number,
  neighbours: 4 | 8,
): number[] {
  const found: number[] = [];
  for (const [dr, dc] of [
    [-1, -1],
    [-1, 0],
    [-1, 1],
    [0, -1],
    [0, 1],
    [1, -1],
    [1, 0],
    [1, 1],
  ]) {
    if (neighbours === 4 && dr !== 0 && dc !== 0) continue;
    const row = Math.floor(cell / width) + dr;
    const column = wraps ? ((cell % width) + dc + width) % width : (cell % width) + dc;
    if (row >= 0 && row < height && column >= 0 && column < width) found.push(row * width + column);
  }
  return found;
}

/** Void cells into which water leaves. Pieces of void touch at sides and corners; a gap is a piece of its own. */
function drainingVoids(terrain: TerrainCase): Set<number> {
  const { z, edges, voids, gap, gaps, width } = terrain;
  const inGap = new Set(cellsOfGap(gap, width));
  const open = new Set<number>();
  const seen = new Set<number>();
  for (let first = 0; first < z.length; first++) {
    if (!Number.isNaN(z[first]) || seen.has(first)) continue;
    const piece = [first];
    seen.add(first);
    for (let i = 0; i < piece.length; i++) {
      for (const other of around(terrain, piece[i], 8)) {
        if (!Number.isNaN(z[other]) || seen.has(other) || inGap.has(other) !== inGap.has(first)) continue;
        seen.add(other);
        piece.push(other);
      }
    }
    const onRim = voids === 'rim' && edges === 'open' && piece.some((cell) => isOnRim(terrain, cell));
    if (voids === 'all' || (inGap.has(first) ? gaps === 'open' : onRim))
      for (const cell of piece) open.add(cell);
  }
  return open;
}
