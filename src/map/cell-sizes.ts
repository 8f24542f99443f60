import type { SurveyView } from './survey-view.ts';

/** Metres between the centres of neighbours, one value a row. */
export interface CellSizes {
  readonly eastM: Float64Array;
  readonly southM: Float64Array;
}

const radians = Math.PI / 180;

/**
 * Sizes for shading: those of the CRS, or on a geographic grid arcs of the ellipsoid at the row's middle (radii of
 * curvature, Snyder, Map Projections: A Working Manual, 1987, eq. 4-18 to 4-21).
 */
export function cellSizes({ height, georeference }: Pick<SurveyView, 'height' | 'georeference'>): CellSizes {
  const { cellWidth, cellHeight, north, crs } = georeference;
  const eastM = new Float64Array(height);
  const southM = new Float64Array(height);
  if (crs.unitM !== null) {
    return { eastM: eastM.fill(cellWidth * crs.unitM), southM: southM.fill(cellHeight * crs.unitM) };
  }
  const a = crs.semiMajorM;
  const e2 = 1 - (crs.semiMinorM / a) ** 2;
  for (let row = 0; row < height; row++) {
    const latitude = (north - (row + 0.5) * cellHeight) * radians;
    const w = Math.sqrt(1 - e2 * Math.sin(latitude) ** 2);
    eastM[row] = Math.max(0, (a / w) * Math.cos(latitude) * cellWidth * radians);
    southM[row] = ((a * (1 - e2)) / w ** 3) * cellHeight * radians;
  }
  return { eastM, southM };
}
