import { readFileSync } from 'node:fs';
import {
  brimLevels,
  type Depressions,
  type Drainage,
  depressionsOf,
  drainageOf,
  type Grid,
  gridOf,
  type Neighbours,
  type OutletRules,
  outletSills,
  type PondMeasures,
  pondMeasures,
  projectedMetrics,
  type Survey,
  surveyOf,
  usualOutlets,
} from '../../src/core/index.ts';
import { epsgFiles } from '../../src/node/epsg-files.ts';
import { fileSource } from '../../src/node/file-source.ts';
import { openTerrain } from '../../src/raster/open-terrain.ts';

/** A terrain filled to the brim, for checks against the world outside. */
export interface Filled {
  readonly grid: Grid;
  readonly survey: Survey;
  readonly drainage: Drainage;
  readonly depressions: Depressions;
  readonly measures: PondMeasures;
  readonly levelM: Float32Array;
}

export function filled(grid: Grid, neighbours: Neighbours, outlets: OutletRules = usualOutlets): Filled {
  const survey = surveyOf(grid, { neighbours });
  const drainage = drainageOf(survey, outletSills(grid, survey, outlets));
  const depressions = depressionsOf(survey, drainage);
  const measures = pondMeasures(grid, survey, drainage, depressions);
  return { grid, survey, drainage, depressions, measures, levelM: brimLevels(grid, survey, drainage) };
}

/** A recorded real terrain by its name in test/data. */
export async function realGrid(name: 'olinda' | 'volcano' | 'etopo60' | 'etopo20'): Promise<Grid> {
  if (name === 'volcano') {
    const path = new URL('../../node_modules/vega-datasets/data/volcano.json', import.meta.url);
    const { width, height, values } = JSON.parse(readFileSync(path, 'utf8'));
    return gridOf(width, height, Float32Array.from(values), projectedMetrics(height, 10, 10));
  }
  const file = name === 'olinda' ? 'olinda_dem_utm25s.tif' : `${name}.tif`;
  const source = await fileSource(new URL(`../data/${file}`, import.meta.url).pathname);
  return (await openTerrain([source], { verticalUnit: 'm', epsg: epsgFiles })).grid;
}

/** Only the lowest cell drains, as on a globe. */
export function deepestOnly(grid: Grid): OutletRules {
  let deepest = 0;
  grid.elevationM.forEach((z, cell) => {
    if (z < grid.elevationM[deepest]) deepest = cell;
  });
  const cells = { cell: Float64Array.of(deepest), levelM: Float32Array.of(Number.NEGATIVE_INFINITY) };
  return { ...usualOutlets, edges: 'closed', voids: 'walls', cells };
}

/** Outermost ponds as nodes. */
export function outermost({ depressions }: Filled): number[] {
  return [...depressions.isPond.keys()].filter(
    (node) => depressions.isPond[node] === 1 && depressions.parent[node] < 0,
  );
}
