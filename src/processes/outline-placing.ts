import type { Position } from 'geojson';
import type { OutlineColumns } from '../core/index.ts';
import type { Terrain } from '../raster/terrain.ts';
import { toCrs84 } from '../raster/transform.ts';
import { degrees } from './geojson-text.ts';

/** How outlines become CRS84 rings that do not cross the antimeridian (RFC 7946, section 3.1.9). */
export interface OutlinePlacing {
  /** Columns to draw in; undefined = the grid's own. */
  readonly columns: OutlineColumns | undefined;
  /** Positions of a ring of corner numbers of those columns. */
  ring(ring: readonly number[]): Position[];
}

/**
 * A wrapped grid is drawn from the antimeridian eastwards, so that nothing is cut elsewhere; another grid that
 * reaches over it is cut there. A cell with the antimeridian inside is drawn as two parts.
 */
export function outlinePlacing(terrain: Terrain): OutlinePlacing {
  const { grid, georeference } = terrain;
  const { west, north, cellWidth, cellHeight, crs } = georeference;
  const toLonLat = toCrs84(crs);
  const at = crs.kind === 'geographic' ? antimeridian(terrain) : -1;
  const edges = at < 0 ? ownEdges(west, cellWidth, grid.width) : edgesFrom(terrain, at);
  const columns = at < 0 ? undefined : columnsFrom(terrain, at);
  const across = edges.length;
  const cut = columns?.cut ?? -1;
  return {
    columns,
    ring: (ring) => {
      const isBeyond = cut >= 0 && ring.some((vertex) => vertex % across > cut);
      return ring.map((vertex) => {
        const column = vertex % across;
        const x = edges[column];
        const [longitude, latitude] = toLonLat(x, north - ((vertex - column) / across) * cellHeight);
        // A projection library may bring longitudes back into ±180°; the grid's own is the steady one.
        const turns = crs.kind === 'geographic' ? Math.round((x - longitude) / 360) : 0;
        return [degrees(longitude + 360 * (turns - (isBeyond ? 1 : 0))), degrees(latitude)];
      });
    },
  };
}

/** Where 180° lies, in columns from the grid's west side as a fraction; −1 where it does not lie inside. */
function antimeridian({ grid, georeference: { west, cellWidth } }: Terrain): number {
  const around = 360 / cellWidth;
  const from = (180 - west) / cellWidth;
  const at = from - Math.floor(from / around) * around;
  const nearest = Math.round(at);
  const position = Math.abs(at - nearest) < 1e-3 ? nearest : at;
  // On the seam of a wrapped grid, or at the side of another, nothing has to be cut.
  return position > 0 && position < grid.width ? position : -1;
}

function ownEdges(west: number, cellWidth: number, width: number): Float64Array {
  return Float64Array.from({ length: width + 1 }, (_, column) => west + column * cellWidth);
}

/** The grid's columns in drawing order, with the one that holds the antimeridian twice where it lies inside. */
function columnsFrom({ grid: { width, frame } }: Terrain, at: number): OutlineColumns {
  const first = Math.floor(at);
  const isSplit = first !== at;
  if (frame.wraps) {
    const source = Int32Array.from({ length: width + (isSplit ? 1 : 0) }, (_, i) => (first + i) % width);
    return { source, cut: -1 };
  }
  const source = Int32Array.from({ length: width + (isSplit ? 1 : 0) }, (_, i) =>
    isSplit && i > first ? i - 1 : i,
  );
  return { source, cut: isSplit ? first + 1 : first };
}

/** Longitudes of the corners of those columns. */
function edgesFrom(
  { grid: { width, frame }, georeference: { west, cellWidth } }: Terrain,
  at: number,
): Float64Array {
  const first = Math.floor(at);
  const isSplit = first !== at;
  const turn = Math.round((west + at * cellWidth - 180) / 360);
  const meridian = 180 + 360 * turn;
  if (frame.wraps) {
    const inner = Array.from(
      { length: width - 1 },
      (_, i) => west + (first + 1 + i) * cellWidth - meridian - 180,
    );
    const last = isSplit ? [west + (first + width) * cellWidth - meridian - 180] : [];
    return Float64Array.from([-180, ...inner, ...last, 180]);
  }
  const edges = Array.from({ length: width + 1 }, (_, column) => west + column * cellWidth);
  if (isSplit) edges.splice(first + 1, 0, meridian);
  else edges[first] = meridian;
  return Float64Array.from(edges);
}
