import { brimLevels } from '../../../src/core/brim-level.ts';
import { type Depressions, depressionsOf } from '../../../src/core/depressions.ts';
import { type Drainage, drainageOf } from '../../../src/core/drainage.ts';
import type { Grid } from '../../../src/core/grid.ts';
import { outletSills } from '../../../src/core/outlets.ts';
import { type PondMeasures, pondMeasures } from '../../../src/core/pond-measures.ts';
import type { Survey } from '../../../src/core/survey.ts';
import { type SurveyOptions, surveyOf } from '../../../src/core/survey-grid.ts';
import { gridOfCase, rulesOfCase, type TerrainCase } from './terrain-case.ts';

/** Everything the core says about one terrain. */
export interface Analysis {
  readonly grid: Grid;
  readonly survey: Survey;
  readonly drainage: Drainage;
  readonly depressions: Depressions;
  readonly measures: PondMeasures;
  readonly levelM: Float32Array;
}

export function analysisOf(terrain: TerrainCase, options: SurveyOptions = {}): Analysis {
  const grid = gridOfCase(terrain);
  const { neighbours, madePits } = terrain;
  const survey = surveyOf(grid, { neighbours, madePits, ...options });
  const drainage = drainageOf(survey, outletSills(grid, survey, rulesOfCase(terrain)));
  const depressions = depressionsOf(survey, drainage);
  const measures = pondMeasures(grid, survey, drainage, depressions);
  return { grid, survey, drainage, depressions, measures, levelM: brimLevels(grid, survey, drainage) };
}

/** A pond in terms that no numbering changes. */
export interface FoundPond {
  readonly node: number;
  /** Ground of its catchments lower than the spill elevation, row-major cells ascending. */
  readonly cells: readonly number[];
  readonly spillM: number;
  readonly pitM: number;
  readonly capacityM3: number;
  /** Position in the list of the pond that holds it, −1 = outermost. */
  readonly parent: number;
}

/** All ponds, lowest spill elevation first, then by first cell; their cells found by climbing from each cell. */
export function pondsOf({ grid, survey, depressions, measures }: Analysis): FoundPond[] {
  const { parent, spillElevationM, pitElevationM, isPond } = depressions;
  const cells = new Map<number, number[]>();
  for (let cell = 0; cell < grid.elevationM.length; cell++) {
    for (let node = survey.leaf[cell]; node >= 0; node = parent[node]) {
      if (isPond[node] === 0 || !(grid.elevationM[cell] < spillElevationM[node])) continue;
      cells.set(node, [...(cells.get(node) ?? []), cell]);
    }
  }
  const nodes = [...isPond.keys()].filter((node) => isPond[node] === 1);
  const first = (node: number): number => cells.get(node)?.[0] ?? -1;
  nodes.sort((a, b) => spillElevationM[a] - spillElevationM[b] || first(a) - first(b));
  return nodes.map((node) => ({
    node,
    cells: cells.get(node) ?? [],
    spillM: spillElevationM[node],
    pitM: pitElevationM[node],
    capacityM3: measures.capacityM3[node],
    parent: parent[node] < 0 ? -1 : nodes.indexOf(parent[node]),
  }));
}
