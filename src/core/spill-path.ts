import { distanceM } from './cell-steps.ts';
import { depressionTree } from './depression-tree.ts';
import type { Depressions } from './depressions.ts';
import { type Drainage, outside } from './drainage.ts';
import { OverbrimError } from './error.ts';
import type { Grid } from './grid.ts';
import { ReceiverField } from './receiver-field.ts';
import { shortestWay } from './shortest-way.ts';
import type { Survey } from './survey.ts';

/** One stretch of a spill path, over land or through a pond. Neighbouring legs share a cell. */
export interface SpillLeg {
  readonly kind: 'land' | 'pond';
  /** Row-major cells, in the order of flow. */
  readonly cells: readonly number[];
  /** The pond's node in the hierarchy, −1 on land. */
  readonly pond: number;
  /** Water surface or ground at both ends, metres. */
  readonly fromElevationM: number;
  readonly toElevationM: number;
  readonly lengthM: number;
}

/** Where the overflow runs, leg by leg. */
export interface SpillPath {
  readonly legs: readonly SpillLeg[];
  /** `outlet`: it leaves there · `no-way`: it ends in ground without any way to an outlet. */
  readonly end: 'outlet' | 'no-way';
}

/**
 * The spill path of a brimful terrain from a cell: along receivers until it first meets a pond's water, from there
 * the shortest way inside that water to the pour point, over it and on, to an outlet. A flat is crossed like a
 * pond, but counts as land.
 * @throws OverbrimError `bad-input` when the cell is void or not in the grid.
 */
export function spillPath(
  grid: Grid,
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
  start: number,
): SpillPath {
  if (!(start >= 0 && start < grid.elevationM.length) || survey.leaf[start] < 0) {
    throw new OverbrimError(
      'bad-input',
      `The start of the path, cell ${start}, is void or not one of the ${grid.elevationM.length} cells of the terrain; choose a place that has an elevation.`,
    );
  }
  const { elevationM } = grid;
  const { tree, levelM } = drainage;
  const { outermost } = depressionTree(depressions);
  const field = new ReceiverField(grid, survey.neighbours, survey.madePits);
  const legs: SpillLeg[] = [];
  const surface = (cell: number): number => Math.max(elevationM[cell], levelM[survey.leaf[cell]]);
  const add = (kind: 'land' | 'pond', pond: number, cells: readonly number[]): void => {
    if (cells.length < 2 && kind === 'land') return;
    let lengthM = 0;
    for (let i = 1; i < cells.length; i++) lengthM += distanceM(grid, cells[i - 1], cells[i]);
    const ends = [cells[0], cells[cells.length - 1]].map(surface);
    legs.push({ kind, cells, pond, fromElevationM: ends[0], toElevationM: ends[1], lengthM });
  };
  const isWet = (leaf: number): boolean => survey.pitElevationM[leaf] < levelM[leaf];

  let land = [start];
  let cell = start;
  for (;;) {
    const leaf = survey.leaf[cell];
    const level = levelM[leaf];
    if (level === Number.POSITIVE_INFINITY) {
      legs.push(dryEnd(grid, field, land));
      return { legs, end: 'no-way' };
    }
    const wet = isWet(leaf);
    // A dry cell at the very level of the pond below still runs down to its water.
    if (elevationM[cell] > level || (wet && elevationM[cell] === level)) {
      cell = field.receiver(cell);
      land.push(cell);
      continue;
    }
    const pond = wet ? outermost[leaf] : -1;
    const sill = wet ? depressions.pourSill[pond] : drainage.sill[leaf];
    const exit = drainage.sill[tree.sillLeaf[sill]] === sill ? tree.sillLeaf[sill] : tree.otherLeaf[sill];
    const exitIsSill = tree.sillLeaf[sill] === exit;
    const last = exitIsSill ? tree.sillCell[sill] : tree.otherCell[sill];
    const beyond = exitIsSill ? tree.otherCell[sill] : tree.sillCell[sill];
    const isWater = (c: number): boolean => {
      const l = survey.leaf[c];
      return l >= 0 && elevationM[c] < level && isWet(l) && outermost[l] === pond;
    };
    const isLevel = (c: number): boolean => survey.leaf[c] === exit && elevationM[c] === level;
    // Between the water and the pour point there may be level ground, which is land.
    let shore = wet ? last : cell;
    while (wet && elevationM[shore] >= level) shore = field.receiver(shore);
    const water = wet ? shortestWay(grid, survey.neighbours, cell, shore, isWater) : [cell];
    const terrace = shortestWay(grid, survey.neighbours, shore, last, isLevel);
    if (water === undefined || terrace === undefined) {
      throw new OverbrimError(
        'failed',
        `No way was found through water at ${level} m from cell ${cell} to its pour point, cell ${last}; this is a fault of the program, please report it with the terrain.`,
      );
    }
    const way = [...water, ...terrace.slice(1)];
    if (!exitIsSill) way.push(beyond);
    if (wet) {
      const pondCells = way.slice(0, water.length + 1);
      add('land', -1, land);
      add('pond', pond, pondCells);
      land = way.slice(pondCells.length - 1);
    } else {
      land.push(...way.slice(1));
    }
    if (drainage.towards[exit] === outside) break;
    if (exitIsSill) land.push(beyond);
    cell = beyond;
  }
  add('land', -1, land);
  return { legs, end: 'outlet' };
}

/** The land leg that ends in a pit without a way on. */
function dryEnd(grid: Grid, field: ReceiverField, land: number[]): SpillLeg {
  const cells = [...land];
  let lengthM = 0;
  for (;;) {
    const last = cells[cells.length - 1];
    const next = field.receiver(last);
    if (next === last) break;
    cells.push(next);
  }
  for (let i = 1; i < cells.length; i++) lengthM += distanceM(grid, cells[i - 1], cells[i]);
  const ends = [cells[0], cells[cells.length - 1]].map((cell) => grid.elevationM[cell]);
  return { kind: 'land', cells, pond: -1, fromElevationM: ends[0], toElevationM: ends[1], lengthM };
}
