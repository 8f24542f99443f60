import { OverbrimError } from './error.ts';

/**
 * The true sizes of a grid's cells, one value a row, in metres and square metres.
 * On a projected grid all rows are equal (`uniform`); on a geographic one they follow the ellipsoid.
 * Worked out once and kept in the survey, since sin and atanh may differ in the last bit between machines.
 */
export interface RowMetrics {
  readonly uniform: boolean;
  /** From a cell's centre to its east neighbour's, `height` values. 0 on a row that lies on a pole. */
  readonly eastM: Float64Array;
  /** From a cell's centre to its south neighbour's, `height` values. */
  readonly southM: Float64Array;
  /** Area of one cell, `height` values. */
  readonly areaM2: Float64Array;
  /** The largest of these areas. */
  readonly areaBoundM2: number;
}

/**
 * Metrics of a projected grid: every cell is `cellWidthM × cellHeightM`.
 * @throws OverbrimError `bad-input` when a size is not a positive number.
 */
export function projectedMetrics(height: number, cellWidthM: number, cellHeightM: number): RowMetrics {
  checkSizes(cellWidthM, cellHeightM, 'metres');
  return {
    uniform: true,
    eastM: new Float64Array(height).fill(cellWidthM),
    southM: new Float64Array(height).fill(cellHeightM),
    areaM2: new Float64Array(height).fill(cellWidthM * cellHeightM),
    areaBoundM2: cellWidthM * cellHeightM,
  };
}

/** An ellipsoid of revolution by its semi-axes in metres. */
export interface Ellipsoid {
  readonly semiMajorM: number;
  readonly semiMinorM: number;
}

/** WGS 84 (EPSG:7030): a = 6378137 m, 1/f = 298.257223563. */
export const wgs84: Ellipsoid = { semiMajorM: 6378137, semiMinorM: 6378137 * (1 - 1 / 298.257223563) };

const radians = Math.PI / 180;

/**
 * Metrics of a geographic grid whose first row's north side lies at `northDeg` and whose cells are
 * `cellWidthDeg × cellHeightDeg`. Rows that reach past a pole (registered on it) are cut there.
 *
 * Area between two parallels: `(b² Δλ / 2) [q(φ₂) − q(φ₁)]`, `q = sin φ / (1 − e² sin² φ) + atanh(e sin φ) / e`
 * (authalic latitude; Snyder, Map Projections: A Working Manual, 1987, eq. 3-12 and 3-18). Radii of curvature
 * for the lengths from the same source, eq. 4-18 to 4-21, taken at the row's middle.
 * @throws OverbrimError `bad-input` when a size is not a positive number.
 */
export function geographicMetrics(
  height: number,
  northDeg: number,
  cellWidthDeg: number,
  cellHeightDeg: number,
  ellipsoid: Ellipsoid = wgs84,
): RowMetrics {
  checkSizes(cellWidthDeg, cellHeightDeg, 'degrees');
  const a = ellipsoid.semiMajorM;
  const b = ellipsoid.semiMinorM;
  const e2 = (a * a - b * b) / (a * a);
  const e = Math.sqrt(e2);
  const q = (latitudeDeg: number): number => {
    const s = Math.sin(clamped(latitudeDeg) * radians);
    return e === 0 ? 2 * s : s / (1 - e2 * s * s) + Math.atanh(e * s) / e;
  };
  const eastM = new Float64Array(height);
  const southM = new Float64Array(height);
  const areaM2 = new Float64Array(height);
  const widthRad = cellWidthDeg * radians;
  const heightRad = cellHeightDeg * radians;
  for (let row = 0; row < height; row++) {
    const top = northDeg - row * cellHeightDeg;
    const middle = (top + (top - cellHeightDeg)) / 2;
    const s = Math.sin(middle * radians);
    const w = Math.sqrt(1 - e2 * s * s);
    eastM[row] = Math.abs(middle) >= 90 - 1e-9 ? 0 : (a / w) * Math.cos(middle * radians) * widthRad;
    southM[row] = ((a * (1 - e2)) / (w * w * w)) * heightRad;
    areaM2[row] = ((b * b * widthRad) / 2) * (q(top) - q(top - cellHeightDeg));
  }
  return {
    uniform: false,
    eastM,
    southM,
    areaM2,
    areaBoundM2: areaM2.reduce((most, area) => Math.max(most, area), 0),
  };
}

function clamped(latitudeDeg: number): number {
  return Math.min(90, Math.max(-90, latitudeDeg));
}

function checkSizes(width: number, height: number, unit: string): void {
  if (!(width > 0 && height > 0 && width * height < Number.POSITIVE_INFINITY)) {
    throw new OverbrimError(
      'bad-input',
      `The cells are ${width} × ${height} ${unit}; expected two positive numbers.`,
    );
  }
}
