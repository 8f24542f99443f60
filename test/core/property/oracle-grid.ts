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
  const { z, edges, outlets, edgeLevelM } = terrain;
  const found: SmallOutlet[] = outlets.filter(({ cell }) => !Number.isNaN(z[cell]));
  const open = drainingVoids(terrain);
  for (let cell = 0; cell < z.length; cell++) {
    if (Number.isNaN(z[cell])) continue;
    if (edges === 'open' && isOnRim(terrain, cell)) found.push({ cell, levelM: edgeLevelM });
    for (const other of around(terrain, cell, terrain.neighbours)) {
      const levelM = open.get(other);
      if (levelM !== undefined) found.push({ cell, levelM });
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

/** Void cells into which water leaves, with the level there. Pieces of void touch at sides and corners; a gap is a piece of its own. */
function drainingVoids(terrain: TerrainCase): Map<number, number> {
  const { z, edges, voids, gap, gaps, width, edgeLevelM, voidLevelM } = terrain;
  const inGap = new Set(cellsOfGap(gap, width));
  const open = new Map<number, number>();
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
    const ofGap = inGap.has(first);
    // Void on the rim of the data is like the rim, so water stands in it as beyond the rim unless it has its own level.
    const likeRim = !ofGap && edges === 'open' && piece.some((cell) => isOnRim(terrain, cell));
    const drains = voids === 'all' || (ofGap ? gaps === 'open' : voids === 'rim' && likeRim);
    const levelM = likeRim && voidLevelM === Number.NEGATIVE_INFINITY ? edgeLevelM : voidLevelM;
    if (drains) for (const cell of piece) open.set(cell, levelM);
  }
  return open;
}
