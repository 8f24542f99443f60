import type { Georeference } from '../raster/terrain.ts';

/** A survey as the map needs it: cells, their leaves, and what is known of each leaf. All arrays are only read. */
export interface SurveyView {
  readonly width: number;
  readonly height: number;
  readonly georeference: Georeference;
  /** First and last column are neighbours. */
  readonly wraps: boolean;
  /** Width × height, row-major, metres; NaN = void. */
  readonly elevationM: Float32Array;
  /** Leaf of each cell, row-major; −1 = void. */
  readonly leaf: Int32Array;
  /** Brim level of each leaf, metres; +∞ = no way to any outlet. */
  readonly levelM: Float32Array;
  /** Outermost pond of each leaf, a place in `ponds`; −1 = none. */
  readonly pondOfLeaf: Int32Array;
  /** Ids of ponds, as the process `depressions` writes them. */
  readonly ponds: readonly string[];
}
