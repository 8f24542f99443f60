import { brimLevels } from '../core/index.ts';
import { keysInMetres } from '../raster/geo-tags.ts';
import type { RasterOut } from '../raster/raster-out.ts';
import type { Terrain } from '../raster/terrain.ts';
import type { Brimful } from './brimful.ts';

/** No-data value of float results: unlike any number, it can never be an elevation. */
const noData = Number.NaN;

/** The brim level of each cell on the grid and CRS of the input, a dropped last column put back. */
export function brimLevelRaster({ terrain, grid, survey, drainage }: Brimful): RasterOut {
  const { georeference, verticalUnit, fromDepths } = terrain;
  const levels = brimLevels(grid, survey, drainage);
  return {
    ...restored(terrain, levels),
    noData,
    georeference: {
      ...georeference,
      geoKeys: keysInMetres(georeference.geoKeys, verticalUnit, fromDepths),
    },
    metadata: {
      description: 'Brim level: elevation to which water fills the terrain before it overflows to an outlet',
      unit: 'm',
    },
  };
}

function restored(
  terrain: Terrain,
  samples: Float32Array,
): { width: number; height: number; samples: Float32Array } {
  const { width, height } = terrain.grid;
  if (!terrain.droppedColumn) return { width, height, samples };
  const wider = new Float32Array((width + 1) * height);
  for (let row = 0; row < height; row++) {
    wider.set(samples.subarray(row * width, (row + 1) * width), row * (width + 1));
    wider[row * (width + 1) + width] = samples[row * width];
  }
  return { width: width + 1, height, samples: wider };
}
