import { OverbrimError } from '../core/index.ts';
import type { VerticalUnit } from '../raster/terrain.ts';
import type { TerrainInputs } from './terrain-inputs.ts';

/** Which terrain is wanted, and how much of it. */
export interface TerrainRequest {
  readonly references: readonly string[];
  readonly verticalUnit?: VerticalUnit;
  /** West, south, east, north in the terrain's CRS. */
  readonly bbox?: readonly [number, number, number, number];
  readonly cellBudget?: number;
}

/** @throws OverbrimError `bad-input` when the extent is not four numbers in order. */
export function terrainRequest({ terrain, verticalUnit, extent, cellBudget }: TerrainInputs): TerrainRequest {
  return {
    references: terrain,
    ...(verticalUnit === undefined ? {} : { verticalUnit }),
    ...(extent === undefined ? {} : { bbox: bboxOf(extent) }),
    ...(cellBudget === undefined ? {} : { cellBudget }),
  };
}

function bboxOf(text: string): [number, number, number, number] {
  const parts = text.split(',').map((part) => (part.trim() === '' ? Number.NaN : Number(part)));
  const [west, south, east, north] = parts;
  if (parts.length !== 4 || !parts.every(Number.isFinite) || !(west < east && south < north)) {
    throw new OverbrimError(
      'bad-input',
      `The input "extent" is "${text}"; expected four numbers west,south,east,north with west below east and south below north.`,
    );
  }
  return [west, south, east, north];
}
