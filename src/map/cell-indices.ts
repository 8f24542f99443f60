import { halved } from './halved.ts';
import type { SurveyView } from './survey-view.ts';
import { latticeStep, type ViewLattice } from './view-lattice.ts';

type Shape = Pick<SurveyView, 'width' | 'height' | 'wraps' | 'georeference'>;

/**
 * Writes the place of the cell under each sample's centre: row-major in the grid halved `halvings` times, −1 where
 * the terrain is not. Between the lattice's exact points grid positions are bilinear.
 */
export function cellIndices(
  size: { readonly width: number; readonly height: number },
  lattice: ViewLattice,
  shape: Shape,
  halvings: number,
  out: Int32Array,
): void {
  const { across, column, row } = lattice;
  const { width, height, georeference, wraps } = shape;
  const stride = halved(width, halvings);
  // Views may show the globe more than once; a projected grid exists once.
  const around = georeference.crs.kind === 'geographic' ? 360 / georeference.cellWidth : 0;
  for (let j = 0; j < size.height; j++) {
    const v = Math.floor(j / latticeStep);
    const t = (j - v * latticeStep) / latticeStep;
    for (let u = 0; u * latticeStep < size.width; u++) {
      const node = v * across + u;
      const below = node + across;
      const c0 = column[node] + (column[below] - column[node]) * t;
      const r0 = row[node] + (row[below] - row[node]) * t;
      const dc = (column[node + 1] + (column[below + 1] - column[node + 1]) * t - c0) / latticeStep;
      const dr = (row[node + 1] + (row[below + 1] - row[node + 1]) * t - r0) / latticeStep;
      const first = j * size.width + u * latticeStep;
      const count = Math.min(latticeStep, size.width - u * latticeStep);
      for (let k = 0; k < count; k++) {
        const r = r0 + dr * k;
        let c = c0 + dc * k;
        if (around > 0) {
          c -= Math.floor(c / around) * around;
          // 360° may end a part of a cell beyond the last column.
          if (wraps && c >= width) c = width - 1;
        }
        out[first + k] =
          r >= 0 && r < height && c >= 0 && c < width ? (r >> halvings) * stride + (c >> halvings) : -1;
      }
    }
  }
}
