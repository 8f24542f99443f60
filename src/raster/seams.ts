import type { Part } from './mosaic.ts';

/** A step in elevation along the line where two tiles meet. */
export interface SeamStep {
  readonly between: readonly [string, string];
  /** How much higher the second tile lies than the first, median over the pairs, metres. */
  readonly stepM: number;
  /** Roughness of the ground beside the seam measured the same way, median, metres. */
  readonly roughnessM: number;
  readonly pairs: number;
}

/** Below the best lidar's error (5 cm, quality level 0) a step says nothing. */
const leastStepM = 0.05;
const fewestPairs = 8;

/**
 * Looks for tiles that sit too high or too low against their neighbours.
 * 1. Across a seam the slope goes on: what the elevations jump beyond the mean of the slopes on both sides is a step.
 * 2. Real ground does that too, to either side alike, so the median over the whole seam is near zero.
 * 3. A median step above 5 cm and above the median roughness (second difference) beside the seam is reported.
 * Common practice, no source; the thresholds are ours.
 */
export function seamSteps(parts: readonly Part[], elevationM: Float32Array, width: number): SeamStep[] {
  const height = elevationM.length / width;
  const steps: SeamStep[] = [];
  for (let i = 0; i < parts.length; i++) {
    for (let j = i + 1; j < parts.length; j++) {
      const jumps: number[] = [];
      const roughness: number[] = [];
      for (const [from, step, outwards, count] of sidesOf(parts[i], width)) {
        for (let k = 0, cell = from; k < count; k++, cell += step) {
          if (ownerAt(parts, cell + outwards, width, height, cell) !== j) continue;
          const inside = [0, 1, 2].map((n) => valueAt(elevationM, width, cell, -n * outwards));
          const outside = [1, 2, 3].map((n) => valueAt(elevationM, width, cell, n * outwards));
          const jump = outside[0] - inside[0] - (inside[0] - inside[1] + outside[1] - outside[0]) / 2;
          if (Number.isNaN(jump)) continue;
          jumps.push(jump);
          for (const [a, b, c] of [inside, outside]) {
            const bend = Math.abs(a - 2 * b + c);
            if (!Number.isNaN(bend)) roughness.push(bend);
          }
        }
      }
      if (jumps.length < fewestPairs) continue;
      const stepM = median(jumps);
      const roughnessM = median(roughness);
      if (Math.abs(stepM) > Math.max(leastStepM, roughnessM)) {
        const names = [parts[i].file.reader.name, parts[j].file.reader.name] as const;
        steps.push({ between: names, stepM, roughnessM, pairs: jumps.length });
      }
    }
  }
  return steps;
}

/** First cell, way along, way out and number of cells of each side of a tile. */
function sidesOf(part: Part, width: number): [number, number, number, number][] {
  const first = part.row * width + part.column;
  const right = first + part.width - 1;
  const bottom = first + (part.height - 1) * width;
  return [
    [first, 1, -width, part.width],
    [bottom, 1, width, part.width],
    [first, width, -1, part.height],
    [right, width, 1, part.height],
  ];
}

/** The tile that a cell was painted from (the first that covers it), −1 outside the grid or across its side. */
function ownerAt(parts: readonly Part[], cell: number, width: number, height: number, from: number): number {
  if (cell < 0 || cell >= width * height) return -1;
  const column = cell % width;
  const row = Math.floor(cell / width);
  if (Math.abs(column - (from % width)) > 1) return -1;
  return parts.findIndex(
    (part) =>
      column >= part.column &&
      column < part.column + part.width &&
      row >= part.row &&
      row < part.row + part.height,
  );
}

/** Elevation `away` cells on, NaN beyond the grid's sides. */
function valueAt(elevationM: Float32Array, width: number, cell: number, away: number): number {
  const to = cell + away;
  if (to < 0 || to >= elevationM.length) return Number.NaN;
  const sideways = Math.abs(away) < width && Math.abs(away) <= 3;
  if (sideways && Math.floor(to / width) !== Math.floor(cell / width)) return Number.NaN;
  return elevationM[to];
}

function median(values: number[]): number {
  if (values.length === 0) return 0;
  const sorted = Float64Array.from(values).sort();
  const half = sorted.length >> 1;
  return sorted.length % 2 ? sorted[half] : (sorted[half - 1] + sorted[half]) / 2;
}
