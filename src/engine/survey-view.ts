import { depressionTree, nowhere } from '../core/index.ts';
import { type Brimful, pondNames } from '../processes/index.ts';
import type { Georeference, VerticalUnit } from '../raster/terrain.ts';

/** What a map needs to paint a brimful terrain and to read it out; arrays are copies that may be transferred. */
export interface SurveyView {
  readonly width: number;
  readonly height: number;
  readonly wraps: boolean;
  readonly georeference: Georeference;
  readonly verticalUnit: VerticalUnit;
  readonly verticalDatum: string | null;
  /** Metres, row-major, NaN = void. */
  readonly elevationM: Float32Array;
  /** Leaf of each cell, −1 = void. */
  readonly leaf: Int32Array;
  /** Brim level of each leaf, metres, +∞ without a way to an outlet. */
  readonly levelM: Float32Array;
  /** Position in `ponds` of the outermost pond over each leaf, −1 where none stands. */
  readonly pondOfLeaf: Int32Array;
  /** Ids of the outermost ponds. */
  readonly ponds: readonly string[];
  /** Cells without elevation. */
  readonly voids: number;
}

export function surveyView({ terrain, grid, survey, drainage, depressions }: Brimful): SurveyView {
  const { outermost } = depressionTree(depressions);
  const nameOf = pondNames(survey, drainage, depressions);
  const positions = new Map<number, number>();
  const ponds: string[] = [];
  const pondOfLeaf = new Int32Array(survey.leaves).fill(-1);
  for (let leaf = 0; leaf < survey.leaves; leaf++) {
    const isWet = survey.pitElevationM[leaf] < drainage.levelM[leaf] && drainage.towards[leaf] !== nowhere;
    if (!isWet) continue;
    const node = outermost[leaf];
    let position = positions.get(node);
    if (position === undefined) {
      position = ponds.push(nameOf(node) ?? '') - 1;
      positions.set(node, position);
    }
    pondOfLeaf[leaf] = position;
  }
  return {
    width: grid.width,
    height: grid.height,
    wraps: grid.frame.wraps,
    georeference: terrain.georeference,
    verticalUnit: terrain.verticalUnit,
    verticalDatum: terrain.verticalDatum,
    elevationM: grid.elevationM.slice(),
    leaf: survey.leaf.slice(),
    levelM: drainage.levelM.slice(),
    pondOfLeaf,
    ponds,
    voids: grid.elevationM.length - survey.cells.reduce((sum, cells) => sum + cells, 0),
  };
}
