import type { Transform } from '../raster/transform.ts';
import type { CanvasFrame } from './canvas-frame.ts';
import type { SurveyView } from './survey-view.ts';

/** Samples between exact points. At 30 m cells bilinear places between them miss by 0.014 of a cell at most. */
export const latticeStep = 32;

/** Exact grid positions (fractions of columns and rows) of every 32nd sample, NaN where there is none. */
export interface ViewLattice {
  readonly across: number;
  readonly down: number;
  readonly column: Float64Array;
  readonly row: Float64Array;
}

type Placed = Pick<SurveyView, 'georeference'>;

/** Projects a frame's lattice. Longitudes run on from point to point, so that no step of 360° lies between two. */
export function viewLattice(frame: CanvasFrame, toTerrain: Transform, { georeference }: Placed): ViewLattice {
  const { west, north, cellWidth, cellHeight, crs } = georeference;
  const across = Math.ceil(frame.width / latticeStep) + 1;
  const down = Math.ceil(frame.height / latticeStep) + 1;
  const column = new Float64Array(across * down);
  const row = new Float64Array(across * down);
  const around = crs.kind === 'geographic' ? 360 / cellWidth : 0;
  const [a, b, c, d, e, f] = frame.toView;
  for (let v = 0; v < down; v++) {
    for (let u = 0; u < across; u++) {
      const i = u * latticeStep;
      const j = v * latticeStep;
      const [x, y] = toTerrain(a * i + c * j + e, b * i + d * j + f);
      const node = v * across + u;
      let at = (x - west) / cellWidth;
      if (around > 0) {
        const before = u > 0 ? column[node - 1] : v > 0 ? column[node - across] : at;
        const turns = Math.round((before - at) / around);
        if (Number.isFinite(turns)) at += turns * around;
      }
      column[node] = at;
      row[node] = (north - y) / cellHeight;
    }
  }
  return { across, down, column, row };
}

/** Cells on a sample's longer way, the mean over the lattice's squares that touch the grid; 0 where none does. */
export function cellsPerSample(lattice: ViewLattice, { width, height, wraps }: SurveyView): number {
  const { across, down, column, row } = lattice;
  let sum = 0;
  let count = 0;
  for (let v = 0; v + 1 < down; v++) {
    for (let u = 0; u + 1 < across; u++) {
      const node = v * across + u;
      const right = node + 1;
      const below = node + across;
      const dx = Math.hypot(column[right] - column[node], row[right] - row[node]);
      const dy = Math.hypot(column[below] - column[node], row[below] - row[node]);
      const reach = dx + dy;
      const outside =
        row[node] < -reach ||
        row[node] > height + reach ||
        (!wraps && (column[node] < -reach || column[node] > width + reach));
      if (outside || !Number.isFinite(reach)) continue;
      sum += Math.max(dx, dy) / latticeStep;
      count++;
    }
  }
  return count === 0 ? 0 : sum / count;
}
