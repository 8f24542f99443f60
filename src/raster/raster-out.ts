import type { Georeference } from './terrain.ts';

/** The sample types that results are written in. */
export type Samples = Float32Array | Uint32Array | Uint8Array;

/** One band that is to be written: `height × width` samples, row by row from the north-west corner. */
export interface RasterOut {
  readonly width: number;
  readonly height: number;
  readonly samples: Samples;
  /** The sample that stands for a void; NaN is allowed for floats; null when there are no voids. */
  readonly noData: number | null;
  readonly georeference: Georeference;
  /** What the band holds and in which unit, for people and for readers that show it. */
  readonly metadata?: { readonly description?: string; readonly unit?: string };
}

/** One resolution of a raster: the raster itself or an overview. */
export interface Level {
  readonly width: number;
  readonly height: number;
  readonly samples: Samples;
}

/** Whether a sample is a void, by `noData` (NaN in floats is always one). */
export function isVoid(sample: number, noData: number | null): boolean {
  return Number.isNaN(sample) || sample === noData;
}
