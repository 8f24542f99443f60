/**
 * Outlines along cell edges. A vertex is a corner of cells: column 0…width, row 0…height, numbered
 * `row * (width + 1) + column`. A directed edge runs from a vertex one cell east, north, west or south (0…3) with
 * the wet cell on its left, so that in a north-up view outer rings turn counter-clockwise and holes clockwise.
 */
export const directions = 4;

/** Start vertices of the four sides of a cell are this far from its own vertex; index = direction. */
export function sideStarts(width: number): readonly number[] {
  const down = width + 1;
  return [down, down + 1, 1, 0];
}

/** How the vertex number changes along each direction. */
export function directionSteps(width: number): readonly number[] {
  return [1, -(width + 1), -1, width + 1];
}

/** The same edge seen from the other side. */
export function reversed(edge: number, steps: readonly number[]): number {
  const direction = edge % directions;
  return (Math.floor(edge / directions) + steps[direction]) * directions + ((direction + 2) % directions);
}

/** One polygon: its outer ring and its holes, each a closed list of vertices (last = first) without needless ones. */
export interface Polygon {
  readonly outer: readonly number[];
  readonly holes: readonly (readonly number[])[];
}

/**
 * Joins the boundary edges of a set of cells to polygons. Cells that touch only at a corner belong to different
 * polygons or to different stretches of one, so no ring touches itself; rings may touch in single points. The
 * order of the result depends on the edges alone.
 */
export function polygonsOf(edges: Iterable<number>, width: number): Polygon[] {
  const steps = directionSteps(width);
  const sorted = Float64Array.from(edges).sort();
  const open = new Set<number>(sorted);
  const rings: number[][] = [];
  for (const first of sorted) {
    if (!open.has(first)) continue;
    for (const ring of simpleRings(trace(first, open, steps))) rings.push(ring);
  }
  const outers: { outer: number[]; holes: number[][] }[] = [];
  const polygonOfEdge = new Map<number, number>();
  const holes: number[][] = [];
  for (const ring of rings) {
    if (isClockwise(ring, width)) holes.push(ring);
    else outers.push({ outer: ring, holes: [] });
  }
  if (holes.length > 0) {
    // A hole's polygon is found north of it, so holes are placed from north to south.
    outers.forEach(({ outer }, i) => {
      markNorthSides(outer, i, steps, polygonOfEdge);
    });
    const ordered = holes.map((ring) => ({ ring, top: Math.min(...ring) })).sort((a, b) => a.top - b.top);
    for (const { ring, top } of ordered) {
      const polygon = polygonNorthOf(top, width, polygonOfEdge);
      outers[polygon].holes.push(ring);
      markNorthSides(ring, polygon, steps, polygonOfEdge);
    }
  }
  return outers.map(({ outer, holes: inner }) => ({
    outer: withoutNeedless(outer),
    holes: inner.map(withoutNeedless),
  }));
}

/** Walks along edges, at a corner of two diagonal cells staying with its own (a left turn), until back at the start. */
function trace(first: number, open: Set<number>, steps: readonly number[]): number[] {
  const ring: number[] = [];
  let edge = first;
  do {
    open.delete(edge);
    const direction = edge % directions;
    const vertex = Math.floor(edge / directions);
    ring.push(vertex);
    const next = (vertex + steps[direction]) * directions;
    edge = -1;
    for (const turn of [1, 0, 3]) {
      const candidate = next + ((direction + turn) % directions);
      if (candidate === first || open.has(candidate)) {
        edge = candidate;
        break;
      }
    }
  } while (edge !== first);
  return ring;
}

/** Cuts a ring wherever it comes back to a vertex, into closed rings that do not touch themselves. */
function simpleRings(ring: readonly number[]): number[][] {
  const rings: number[][] = [];
  const way: number[] = [];
  const at = new Map<number, number>();
  for (const vertex of ring) {
    const seen = at.get(vertex);
    if (seen !== undefined) {
      const loop = way.splice(seen);
      for (const passed of loop) at.delete(passed);
      rings.push([...loop, vertex]);
    }
    at.set(vertex, way.push(vertex) - 1);
  }
  rings.push([...way, way[0]]);
  return rings;
}

/** Twice the signed area is negative in a north-up view. */
function isClockwise(ring: readonly number[], width: number): boolean {
  const across = width + 1;
  let twice = 0;
  for (let i = 1; i < ring.length; i++) {
    const x0 = ring[i - 1] % across;
    const x1 = ring[i] % across;
    const y0 = Math.floor(ring[i - 1] / across);
    const y1 = Math.floor(ring[i] / across);
    // Rows grow southwards, hence the sign.
    twice -= x0 * y1 - x1 * y0;
  }
  return twice < 0;
}

/** Notes to which polygon each north side of a ring (an edge that runs west) belongs, by its west vertex. */
function markNorthSides(
  ring: readonly number[],
  polygon: number,
  steps: readonly number[],
  polygonOfEdge: Map<number, number>,
): void {
  for (let i = 1; i < ring.length; i++) {
    if (ring[i] - ring[i - 1] === steps[2]) polygonOfEdge.set(ring[i], polygon);
  }
}

/** From the wet cell north of a hole's topmost vertex upwards to the first north side. */
function polygonNorthOf(top: number, width: number, polygonOfEdge: Map<number, number>): number {
  for (let vertex = top - (width + 1); vertex >= 0; vertex -= width + 1) {
    const polygon = polygonOfEdge.get(vertex);
    if (polygon !== undefined) return polygon;
  }
  return 0;
}

/** Vertices are kept at corners, and at every sixteenth cell of a straight run so that a projected run can bend. */
const longestRun = 16;

function withoutNeedless(ring: readonly number[]): number[] {
  const last = ring.length - 1;
  const kept: number[] = [];
  let run = 0;
  for (let i = 0; i < last; i++) {
    const before = ring[i] - ring[i === 0 ? last - 1 : i - 1];
    const after = ring[i + 1] - ring[i];
    run++;
    if (before === after && run < longestRun) continue;
    kept.push(ring[i]);
    run = 0;
  }
  return [...kept, kept[0]];
}
