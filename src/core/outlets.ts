import { emptySills, type Sills, setSill } from './forest.ts';
import type { Grid } from './grid.ts';
import type { Survey } from './survey.ts';

/** Where water leaves for good. Levels are of the water outside, metres; −∞ where the ground alone decides. */
export interface OutletRules {
  /** Whether water leaves over the rim of the data. */
  readonly edges: 'open' | 'closed';
  /** `rim`: pieces of void joined to the rim drain like the rim, enclosed ones are walls · `walls`: no piece drains · `all`: every piece drains. */
  readonly voids: 'rim' | 'walls' | 'all';
  /** Level of the water beyond the rim, and in voids that drain like it. */
  readonly edgeLevelM: number;
  /** Level of the water in pieces of void that drain; −∞ leaves those that drain like the rim at its level. */
  readonly voidLevelM: number;
  /** Narrow gaps between the files of a mosaic: walls, or open like an outlet. */
  readonly gaps: 'walls' | 'open';
  readonly cells: OutletCells;
}

/** Named outlet cells, row-major indices ascending, each with its level. */
export interface OutletCells {
  readonly cell: Float64Array;
  readonly levelM: Float32Array;
}

export const noOutletCells: OutletCells = { cell: new Float64Array(0), levelM: new Float32Array(0) };

/** Open edges, void pieces on the rim, gaps closed, nothing named. */
export const usualOutlets: OutletRules = {
  edges: 'open',
  voids: 'rim',
  gaps: 'walls',
  edgeLevelM: Number.NEGATIVE_INFINITY,
  voidLevelM: Number.NEGATIVE_INFINITY,
  cells: noOutletCells,
};

/** The cell that stands for the outside in added sills. */
export const outsideCell = -1;

/**
 * The edges that join leaves to the outside, each at max(level outside, ground). The outside is numbered as one
 * more leaf, `survey.leaves`.
 */
export function outletSills(grid: Grid, survey: Survey, rules: OutletRules): Sills {
  const found: { leaf: number; cell: number; elevationM: number }[] = [];
  if (rules.edges === 'open') {
    survey.rimLeaf.forEach((leaf, i) => {
      found.push({
        leaf,
        cell: survey.rimCell[i],
        elevationM: Math.max(rules.edgeLevelM, survey.rimElevationM[i]),
      });
    });
  }
  survey.besideLeaf.forEach((leaf, i) => {
    const levelM = levelInVoid(rules, survey, survey.besidePiece[i]);
    if (levelM === null) return;
    found.push({
      leaf,
      cell: survey.besideCell[i],
      elevationM: Math.max(levelM, survey.besideElevationM[i]),
    });
  });
  const named = new Map<number, { leaf: number; cell: number; elevationM: number }>();
  rules.cells.cell.forEach((cell, i) => {
    const leaf = survey.leaf[cell];
    if (leaf < 0) return;
    const elevationM = Math.max(rules.cells.levelM[i], grid.elevationM[cell]);
    const held = named.get(leaf);
    if (held === undefined || elevationM < held.elevationM) named.set(leaf, { leaf, cell, elevationM });
  });
  found.push(...named.values());
  const sills = emptySills(found.length);
  found.forEach(({ leaf, cell, elevationM }, i) => {
    setSill(sills, i, elevationM, cell, outsideCell, leaf, survey.leaves);
  });
  return sills;
}

/** Level at which a piece of void takes water, null where it is a wall. */
function levelInVoid(rules: OutletRules, survey: Survey, piece: number): number | null {
  const { edges, voids, gaps, edgeLevelM, voidLevelM } = rules;
  const isGap = survey.voidIsGap[piece] === 1;
  const isLikeRim = !isGap && edges === 'open' && voids !== 'walls' && survey.voidOnRim[piece] === 1;
  if (isLikeRim) return voidLevelM === Number.NEGATIVE_INFINITY ? edgeLevelM : voidLevelM;
  return voids === 'all' || (isGap && gaps === 'open') ? voidLevelM : null;
}

/**
 * Outlet cells that must be made pits: those that touch ground which is no outlet, so that what runs to them
 * leaves there. Inner cells of a reach run to these or are pits already.
 */
export function outletPits(grid: Grid, cells: OutletCells): Float64Array {
  const { width, height } = grid;
  const isOutlet = new Set(cells.cell);
  return cells.cell.filter((cell) => {
    const row = Math.floor(cell / width);
    const column = cell - row * width;
    for (let dr = -1; dr <= 1; dr++) {
      for (let dc = -1; dc <= 1; dc++) {
        const r = row + dr;
        const c = grid.frame.wraps ? (column + dc + width) % width : column + dc;
        if (r >= 0 && r < height && c >= 0 && c < width && !isOutlet.has(r * width + c)) return true;
      }
    }
    return false;
  });
}
