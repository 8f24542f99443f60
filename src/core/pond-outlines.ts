import { depressionTree, smallestAbove } from './depression-tree.ts';
import type { Depressions } from './depressions.ts';
import type { Drainage } from './drainage.ts';
import type { Grid } from './grid.ts';
import { directionSteps, directions, type Polygon, polygonsOf, reversed, sideStarts } from './rings.ts';
import type { Survey } from './survey.ts';

/** The columns in which outlines are drawn, where they are not the grid's own from west to east. */
export interface OutlineColumns {
  /** The grid's column that each stands for; one that is cut through its middle stands twice. */
  readonly source: Int32Array;
  /** Column of corners at which outlines are cut, −1 = none. */
  readonly cut: number;
}

export interface PondOutline {
  readonly node: number;
  readonly polygons: readonly Polygon[];
}

/**
 * Outlines of the kept ponds one after the other, nested ones (which need `nested`) before those that hold them.
 * Where a grid wraps, outlines are cut at its seam; `columns` lets them start and be cut elsewhere.
 *
 * Each cell belongs to the smallest pond that wets it. A pond's boundary is that of its children, with the sides
 * of its own cells added, or taken away where they met; so deep nesting costs no more than the boundaries.
 */
export function* pondOutlines(
  grid: Grid,
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
  kept: Uint8Array,
  options: { nested: boolean; columns?: OutlineColumns },
): Generator<PondOutline> {
  const tree = depressionTree(depressions);
  const { columns, nested } = options;
  const own = pondOfCells(grid, survey, drainage, depressions, nested);
  const group = columns === undefined ? own : rearranged(own, grid, columns.source);
  const width = columns === undefined ? grid.width : columns.source.length;
  const cut = columns?.cut ?? -1;
  const { starts, edges } = sidesOfGroups(
    { width, height: grid.height },
    group,
    depressions.parent.length,
    cut,
  );
  if (!nested) {
    for (let node = 0; node < kept.length; node++) {
      if (kept[node] === 1) {
        yield { node, polygons: polygonsOf(edges.subarray(starts[node], starts[node + 1]), width) };
      }
    }
    return;
  }
  const toggle = boundaryToggle(width, cut);
  const boundaries = new Map<number, Set<number>>();
  for (let i = tree.order.length - 1; i >= 0; i--) {
    const node = tree.order[i];
    const boundary = boundaries.get(node) ?? new Set<number>();
    boundaries.delete(node);
    for (let k = starts[node]; k < starts[node + 1]; k++) {
      toggle(boundary, edges[k]);
    }
    if (kept[node] === 1) yield { node, polygons: polygonsOf(boundary, width) };
    const up = depressions.parent[node];
    if (up >= 0 && boundary.size > 0) boundaries.set(up, merged(boundaries.get(up), boundary, toggle));
  }
}

/**
 * The pond of each cell, −1 on dry ground and voids: the outermost that wets it, or with `smallest` the smallest.
 */
export function pondOfCells(
  grid: Grid,
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
  smallest: boolean,
): Int32Array {
  const tree = depressionTree(depressions);
  const { elevationM } = grid;
  const { leaf } = survey;
  const { levelM } = drainage;
  const group = new Int32Array(elevationM.length);
  for (let cell = 0; cell < group.length; cell++) {
    const l = leaf[cell];
    const z = elevationM[cell];
    const wet = l >= 0 && z < levelM[l] && levelM[l] < Number.POSITIVE_INFINITY;
    group[cell] = !wet ? -1 : smallest ? smallestAbove(depressions, tree, l, z) : tree.outermost[l];
  }
  return group;
}

/** The ponds of cells in other columns. */
function rearranged(group: Int32Array, { width, height }: Grid, source: Int32Array): Int32Array {
  const across = source.length;
  const out = new Int32Array(across * height);
  for (let row = 0; row < height; row++) {
    for (let column = 0; column < across; column++)
      out[row * across + column] = group[row * width + source[column]];
  }
  return out;
}

/** The sides of cells that meet another group, as directed edges, by group. */
function sidesOfGroups(
  grid: Pick<Grid, 'width' | 'height'>,
  group: Int32Array,
  groups: number,
  cutColumn: number,
): { starts: Float64Array; edges: Float64Array } {
  const { width, height } = grid;
  const offsets = sideStarts(width);
  const visit = (take: (of: number, edge: number) => void): void => {
    for (let row = 0; row < height; row++) {
      for (let column = 0; column < width; column++) {
        const cell = row * width + column;
        const own = group[cell];
        if (own < 0) continue;
        const vertex = row * (width + 1) + column;
        const south = row + 1 < height ? group[cell + width] : -1;
        const east = column + 1 < width && column + 1 !== cutColumn ? group[cell + 1] : -1;
        const north = row > 0 ? group[cell - width] : -1;
        const west = column > 0 && column !== cutColumn ? group[cell - 1] : -1;
        if (south !== own) take(own, (vertex + offsets[0]) * directions);
        if (east !== own) take(own, (vertex + offsets[1]) * directions + 1);
        if (north !== own) take(own, (vertex + offsets[2]) * directions + 2);
        if (west !== own) take(own, (vertex + offsets[3]) * directions + 3);
      }
    }
  };
  const starts = new Float64Array(groups + 1);
  visit((of) => {
    starts[of + 1]++;
  });
  for (let g = 0; g < groups; g++) starts[g + 1] += starts[g];
  const next = starts.slice(0, groups);
  const edges = new Float64Array(starts[groups]);
  visit((of, edge) => {
    edges[next[of]++] = edge;
  });
  return { starts, edges };
}

/** Adds a side to a boundary, or takes away its other side; sides on the cut stay on both sides of it. */
function boundaryToggle(width: number, cutColumn: number): (boundary: Set<number>, edge: number) => void {
  const steps = directionSteps(width);
  const isOnCut = (edge: number): boolean =>
    edge % 2 === 1 && Math.floor(edge / directions) % (width + 1) === cutColumn;
  return (boundary, edge) => {
    if (isOnCut(edge) || !boundary.delete(reversed(edge, steps))) boundary.add(edge);
  };
}

/** The boundary of two sets of cells together; the smaller is poured into the larger. */
function merged(
  held: Set<number> | undefined,
  more: Set<number>,
  toggle: (boundary: Set<number>, edge: number) => void,
): Set<number> {
  if (held === undefined) return more;
  const [large, small] = held.size >= more.size ? [held, more] : [more, held];
  for (const edge of small) toggle(large, edge);
  return large;
}
