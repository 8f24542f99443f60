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
import { counted } from './counted.ts';
import {
  addOutlet,
  addOutletFeatures,
  deepestCell,
  type OutletLevels,
  sortedOutlets,
} from './outlet-cells.ts';
import type { TerrainInputs } from './terrain-inputs.ts';
import { terrainRequest } from './terrain-request.ts';
import type { TerrainStore, TextFile } from './terrain-store.ts';
import { isTypedPlace, namedCrs, typedCell } from './typed-place.ts';

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
  // A misspelt CRS should be told even where no place is typed.
  if (inputs.crs !== undefined) await namedCrs(inputs.crs, store);
  const terrain = await terrainOf(inputs, context, store);
  recordTerrain(terrain, context);
  const files = await outletFiles(inputs, context, store);
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
    // A file may hold something else when it is asked about again.
    contents: Array.from(files.values(), ({ sha256 }) => sha256),
  });
  const analysis = await store.kept(terrain, key, () => filledToBrim(terrain, inputs, files, context, store));
  noteLandlocked(analysis.survey, analysis.drainage, context);
  return analysis;
}

async function filledToBrim(
  terrain: Terrain,
  inputs: TerrainInputs,
  files: ReadonlyMap<string, TextFile>,
  context: JobContext,
  store: TerrainStore,
): Promise<Brimful> {
  const { grid } = terrain;
  const rules = await outletRules(inputs, terrain, files, store);
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
  files: ReadonlyMap<string, TextFile>,
  store: TerrainStore,
): Promise<OutletRules> {
  const levels: OutletLevels = new Map();
  const levelM = inputs.outletLevel ?? Number.NEGATIVE_INFINITY;
  let voids: OutletRules['voids'] = inputs.voids;
  for (const outlet of inputs.outlets ?? []) {
    const file = files.get(outlet);
    if (file !== undefined) addOutletFeatures(levels, terrain, outlet, file.text, levelM);
    else if (outlet === 'voids') voids = 'all';
    else if (outlet === 'deepest') addOutlet(levels, [deepestCell(terrain.grid)], levelM);
    else addOutlet(levels, [await typedCell(terrain, 'outlets', outlet, inputs.crs, store)], levelM);
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

/** The files among the outlets by the path or URL that was given; recorded, since a path alone tells not what they held. */
async function outletFiles(
  { outlets = [] }: TerrainInputs,
  context: JobContext,
  store: TerrainStore,
): Promise<ReadonlyMap<string, TextFile>> {
  const files = new Map<string, TextFile>();
  for (const outlet of outlets) {
    if (outlet === 'voids' || outlet === 'deepest' || isTypedPlace(outlet)) continue;
    files.set(outlet, await outletFile(outlet, store));
  }
  if (files.size > 0) {
    const identities = Array.from(files.values(), ({ name, sha256 }) => ({ input: 'outlets', name, sha256 }));
    context.record('textFiles', identities);
  }
  return files;
}

/** A file of outlets; what is no file is none of the other ways to name one either. */
async function outletFile(outlet: string, store: TerrainStore): Promise<TextFile> {
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
    files: terrain.files.map(({ name, sha256, hashOf }) => ({ name, sha256, hashOf })),
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
      `${counted(cells, 'cell')} in ${counted(leaves, 'catchment')} ${cells === 1 ? 'has' : 'have'} no way to any outlet, since voids or closed edges enclose ${cells === 1 ? 'it; it gets' : 'them; they get'} no brim level and no pond.`,
    );
  }
}
