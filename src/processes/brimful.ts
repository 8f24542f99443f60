import {
  type Depressions,
  type Drainage,
  depressionsOf,
  drainageOf,
  type Grid,
  type OutletRules,
  OverbrimError,
  outletPits,
  outletSills,
  type PondMeasures,
  pondMeasures,
  type Survey,
} from '../core/index.ts';
import type { JobContext } from '../host/index.ts';
import type { Terrain } from '../raster/terrain.ts';
import {
  addOutlet,
  addOutletFeatures,
  deepestCell,
  type OutletLevels,
  sortedOutlets,
} from './outlet-cells.ts';
import type { TerrainInputs } from './terrain-inputs.ts';
import { terrainRequest } from './terrain-request.ts';
import type { TerrainStore } from './terrain-store.ts';
import { isTypedPlace, typedCell } from './typed-place.ts';

/** A terrain with every depression filled to its brim. */
export interface Brimful {
  readonly terrain: Terrain;
  readonly grid: Grid;
  readonly survey: Survey;
  readonly drainage: Drainage;
  readonly depressions: Depressions;
  readonly measures: PondMeasures;
}

/**
 * Reads the terrain, surveys it and fills it to the brim, by the inputs of terrain-inputs.ts.
 * @throws OverbrimError `no-outlet` when no water can leave anywhere; and what reading and outlets throw.
 */
export async function brimful(
  inputs: TerrainInputs,
  context: JobContext,
  store: TerrainStore,
): Promise<Brimful> {
  const terrain = await terrainOf(inputs, context, store);
  recordTerrain(terrain, context);
  const { edges, neighbours, voids, gaps, outlets, crs, edgeLevel, voidLevel, outletLevel } = inputs;
  const key = JSON.stringify({
    edges,
    neighbours,
    voids,
    gaps,
    outlets,
    crs,
    edgeLevel,
    voidLevel,
    outletLevel,
  });
  const analysis = await store.kept(terrain, key, () => filledToBrim(terrain, inputs, context, store));
  noteLandlocked(analysis.survey, analysis.drainage, context);
  return analysis;
}

async function filledToBrim(
  terrain: Terrain,
  inputs: TerrainInputs,
  context: JobContext,
  store: TerrainStore,
): Promise<Brimful> {
  const { grid } = terrain;
  const rules = await outletRules(inputs, terrain, store);
  const survey = await store.survey(terrain, inputs.neighbours, outletPits(grid, rules.cells), context);
  await context.breathe();
  const outlets = outletSills(grid, survey, rules);
  if (outlets.elevationM.length === 0) {
    throw new OverbrimError(
      'no-outlet',
      `The terrain has no outlet: edges are ${rules.edges}${grid.frame.wraps ? ' and the grid wraps around the globe' : ''}, voids are "${rules.voids}" and no outlet was named; open the edges or name an outlet, such as --outlets deepest.`,
    );
  }
  context.progress(0.8, 'finding ponds');
  await context.breathe();
  const drainage = drainageOf(survey, outlets);
  await context.breathe();
  const depressions = depressionsOf(survey, drainage);
  await context.breathe();
  context.progress(0.85, 'measuring ponds');
  const measures = pondMeasures(grid, survey, drainage, depressions);
  await context.breathe();
  return { terrain, grid, survey, drainage, depressions, measures };
}

/** The terrain that the inputs name. */
export function terrainOf(inputs: TerrainInputs, context: JobContext, store: TerrainStore): Promise<Terrain> {
  return store.terrain(terrainRequest(inputs), context);
}

async function outletRules(
  inputs: TerrainInputs,
  terrain: Terrain,
  store: TerrainStore,
): Promise<OutletRules> {
  const levels: OutletLevels = new Map();
  const levelM = inputs.outletLevel ?? Number.NEGATIVE_INFINITY;
  let voids: OutletRules['voids'] = inputs.voids;
  for (const outlet of inputs.outlets ?? []) {
    if (outlet === 'voids') voids = 'all';
    else if (outlet === 'deepest') addOutlet(levels, [deepestCell(terrain.grid)], levelM);
    else if (isTypedPlace(outlet)) {
      const cell = await typedCell(terrain, 'outlets', outlet, inputs.crs, store);
      addOutlet(levels, [cell], levelM);
    } else addOutletFeatures(levels, terrain, outlet, await outletText(outlet, store), levelM);
  }
  return {
    edges: inputs.edges,
    voids,
    gaps: inputs.gaps,
    edgeLevelM: inputs.edgeLevel ?? Number.NEGATIVE_INFINITY,
    voidLevelM: inputs.voidLevel ?? Number.NEGATIVE_INFINITY,
    cells: sortedOutlets(levels),
  };
}

/** The text of a file of outlets; what is no file is none of the other ways to name one either. */
async function outletText(outlet: string, store: TerrainStore): Promise<string> {
  try {
    return await store.text(outlet);
  } catch (cause) {
    if (!(cause instanceof OverbrimError) || cause.code !== 'unreadable') throw cause;
    throw new OverbrimError(
      'bad-input',
      `The outlet "${outlet}" is neither x,y nor voids nor deepest nor a GeoJSON file that can be read (${cause.message.replace(/\.$/, '')}).`,
      { cause },
    );
  }
}

function recordTerrain(terrain: Terrain, context: JobContext): void {
  const { grid, georeference } = terrain;
  context.record('terrain', {
    sha256: terrain.sha256,
    files: terrain.files.map(({ name, sha256 }) => ({ name, sha256 })),
    width: grid.width,
    height: grid.height,
    crs: georeference.crs.name,
    epsg: georeference.crs.epsg,
    cellWidth: georeference.cellWidth,
    cellHeight: georeference.cellHeight,
    verticalUnit: terrain.verticalUnit,
    verticalDatum: terrain.verticalDatum,
  });
  for (const { message } of terrain.notices) context.note(message);
}

function noteLandlocked(survey: Survey, drainage: Drainage, context: JobContext): void {
  let cells = 0;
  let leaves = 0;
  drainage.levelM.forEach((level, leaf) => {
    if (level !== Number.POSITIVE_INFINITY) return;
    cells += survey.cells[leaf];
    leaves++;
  });
  if (cells > 0) {
    context.note(
      `${cells} cells in ${leaves} catchments have no way to any outlet, since voids or closed edges enclose them; they get no brim level and no pond.`,
    );
  }
}
