import { OverbrimError } from '../core/error.ts';
import type { CellRect } from '../core/grid.ts';
import { type Grid, gridOf, plainFrame } from '../core/grid.ts';
import { geographicMetrics, projectedMetrics } from '../core/metrics.ts';
import { absurdNotices } from './absurd-values.ts';
import { type ByteSource, memorySource } from './byte-source.ts';
import { stopIfCancelled } from './cancel.ts';
import { type ElevationFile, elevationFile } from './elevation-file.ts';
import type { EpsgLookup } from './epsg.ts';
import { gapsBetween } from './gaps.ts';
import { globeOf } from './globe.ts';
import { sha256Hex } from './hash.ts';
import type { BlockPlaces } from './image-layout.ts';
import { defaultLimits, type ReadLimits } from './limits.ts';
import { checkSameReference, type Mosaic, type Part } from './mosaic.ts';
import { gapNotice, planNotices, seamNotice } from './notices.ts';
import { paintWindow } from './paint-window.ts';
import { checkedPlaces } from './read-blocks.ts';
import { cut, type Extract, type Plan, readingPlan } from './reading-plan.ts';
import { seamSteps } from './seams.ts';
import type { Georeference, Terrain, TerrainFile, VerticalUnit } from './terrain.ts';
import { terrainHash } from './terrain-hash.ts';
import { verticalUnitM } from './vertical.ts';

export interface OpenOptions extends Extract {
  /** Unit of the elevations, for files that do not tell. */
  readonly verticalUnit?: VerticalUnit;
  /** Limits to raise or lower; see `defaultLimits`. */
  readonly limits?: Partial<ReadLimits>;
  /** Finds EPSG codes, where they are not to be loaded as packaged JSON modules. */
  readonly epsg?: EpsgLookup;
  readonly signal?: AbortSignal;
  /** Told the share of cells read, 0 to 1. */
  readonly progress?: (fraction: number) => void;
}

/**
 * Reads one elevation file, or several as a mosaic, into float32 metres.
 * The first file named wins where several have a value. Sources are closed in the end.
 * @throws OverbrimError with a sentence: `unreadable` or `unsupported` for what is wrong with a file, `unit-missing`,
 * `bad-input` for what is wrong with the options alone.
 */
export async function openTerrain(
  sources: readonly ByteSource[],
  options: OpenOptions = {},
): Promise<Terrain> {
  if (sources.length === 0) {
    throw new OverbrimError('bad-input', 'No elevation file was given; name at least one.');
  }
  try {
    return await read(sources, options);
  } finally {
    await Promise.all(sources.map((source) => source.close?.()));
  }
}

async function read(sources: readonly ByteSource[], options: OpenOptions): Promise<Terrain> {
  const limits = { ...defaultLimits, ...options.limits };
  const { verticalUnit, epsg, signal } = options;
  const files: ElevationFile[] = [];
  for (const source of sources)
    files.push(await elevationFile(source, { limits, verticalUnit, epsg, signal }));
  checkSameReference(files);
  const plan = readingPlan(files, options, limits.cells);
  const notices = await planNotices(files, plan, epsg);
  const tasks = await readingTasks(plan);
  const hashes = await wholeFiles(files, plan, limits);
  const elevationM = await paintedElevations(plan, tasks, options);
  const parts = partsIn(plan);
  const gaps = gapsBetween(parts);
  const rects = gaps.map(({ column, row, width, height }) => ({ column, row, width, height }));
  const grid = fileGrid(() => gridFor(files[0], plan, elevationM, rects));
  const georeference = georeferenceFor(files[0], plan);
  notices.push(...absurdNotices(grid.elevationM, grid.width, georeference));
  notices.push(...gaps.map((gap) => gapNotice(gap, georeference)));
  notices.push(...seamSteps(parts, grid.elevationM, grid.width).map(seamNotice));
  return {
    grid,
    georeference,
    verticalUnit: files[0].vertical.unit,
    fromDepths: files[0].vertical.downwards,
    verticalDatum: files.find((file) => file.vertical.datum !== null)?.vertical.datum ?? null,
    files: await Promise.all(files.map(async (file, i) => identified(file, hashes[i]))),
    sha256: await terrainHash(grid.width, grid.height, georeference, grid.elevationM),
    notices,
    droppedColumn: plan.droppedColumn && plan.rect.width === plan.mosaic.width - 1,
  };
}

/** One file's cells to read. */
interface Task {
  readonly part: Part;
  /** In cells of the part. */
  readonly rect: CellRect;
  readonly places: BlockPlaces;
}

async function readingTasks({ mosaic, rect }: Plan): Promise<Task[]> {
  const tasks: Task[] = [];
  for (const part of mosaic.parts) {
    const shared = cut(part, rect);
    if (shared.width < 1 || shared.height < 1) continue;
    const own = { ...shared, column: shared.column - part.column, row: shared.row - part.row };
    tasks.push({ part, rect: own, places: await checkedPlaces(part.layout, own) });
  }
  return tasks;
}

/** Files that are read from end to end anyway are loaded at once, so that their hash is the file's own. */
async function wholeFiles(
  files: readonly ElevationFile[],
  plan: Plan,
  limits: ReadLimits,
): Promise<(string | null)[]> {
  const { mosaic, rect, level } = plan;
  const dropped = plan.droppedColumn ? 1 : 0;
  const all = level === 0 && rect.width === mosaic.width - dropped && rect.height === mosaic.height;
  const hashes: (string | null)[] = [];
  for (const { reader } of files) {
    const { size, name } = reader;
    if (!all || size === null || size > limits.wholeFileBytes) hashes.push(null);
    else {
      const bytes = await reader.bytes(0, size, 'the whole file');
      reader.useWhole(memorySource(name, bytes));
      hashes.push(await sha256Hex(bytes));
    }
  }
  return hashes;
}

async function identified({ reader }: ElevationFile, hash: string | null): Promise<TerrainFile> {
  return hash === null
    ? { name: reader.name, sha256: await reader.rangesHash(), hashOf: 'ranges' }
    : { name: reader.name, sha256: hash, hashOf: 'file' };
}

async function paintedElevations(
  { rect }: Plan,
  tasks: readonly Task[],
  { signal, progress }: OpenOptions,
): Promise<Float32Array> {
  const total = tasks.reduce((sum, task) => sum + task.rect.width * task.rect.height, 0);
  const elevationM = allocated(rect);
  let painted = 0;
  for (const { part, rect: own, places } of tasks) {
    const { meaning, vertical } = part.file;
    const metresPerUnit = verticalUnitM[vertical.unit] * (vertical.downwards ? -1 : 1);
    const canvas = {
      elevationM,
      width: rect.width,
      column: part.column - rect.column,
      row: part.row - rect.row,
    };
    await paintWindow(part.layout, places, own, canvas, { meaning, metresPerUnit }, (cells) => {
      stopIfCancelled(signal);
      painted += cells;
      progress?.(painted / total);
    });
  }
  stopIfCancelled(signal);
  return elevationM;
}

function allocated({ width, height }: CellRect): Float32Array {
  try {
    return new Float32Array(width * height).fill(Number.NaN);
  } catch (cause) {
    throw new OverbrimError(
      'out-of-memory',
      `There is no memory for ${width} × ${height} cells (${4 * width * height} bytes); give a smaller extent (--extent) or cell budget (--cell-budget).`,
      { cause },
    );
  }
}

/** What the grid finds wrong is in the cells of the files, not in what the caller asked for. */
function fileGrid(make: () => Grid): Grid {
  try {
    return make();
  } catch (error) {
    if (error instanceof OverbrimError && error.code === 'bad-input') {
      throw new OverbrimError('unreadable', error.message, { cause: error });
    }
    throw error;
  }
}

function gridFor(
  { crs }: ElevationFile,
  plan: Plan,
  elevationM: Float32Array,
  gaps: readonly CellRect[],
): Grid {
  const { rect, mosaic } = plan;
  const { north, cellWidth, cellHeight } = mosaic.placement;
  if (crs.kind === 'projected') {
    const unit = crs.unitM ?? 1;
    const metrics = projectedMetrics(rect.height, cellWidth * unit, cellHeight * unit);
    return gridOf(rect.width, rect.height, elevationM, metrics, plainFrame, gaps);
  }
  const metrics = geographicMetrics(rect.height, north - rect.row * cellHeight, cellWidth, cellHeight, crs);
  return gridOf(
    rect.width,
    rect.height,
    elevationM,
    metrics,
    frameOf(mosaic, rect, plan.droppedColumn),
    gaps,
  );
}

/** The whole globe's frame as far as the window keeps it. */
function frameOf(mosaic: Mosaic, rect: CellRect, dropped: boolean): Grid['frame'] {
  const { frame } = globeOf(mosaic.placement, mosaic.width, mosaic.height);
  if (!frame.wraps || rect.width < mosaic.width - (dropped ? 1 : 0)) return plainFrame;
  return {
    wraps: true,
    north: rect.row === 0 ? frame.north : 'beyond',
    south: rect.row + rect.height === mosaic.height ? frame.south : 'beyond',
  };
}

function georeferenceFor(file: ElevationFile, { mosaic, rect }: Plan): Georeference {
  const { west, north, cellWidth, cellHeight } = mosaic.placement;
  return {
    crs: file.crs,
    west: west + rect.column * cellWidth,
    north: north - rect.row * cellHeight,
    cellWidth,
    cellHeight,
    pixelIsPoint: file.pixelIsPoint,
    geoKeys: file.geoKeys.tags,
  };
}

/** The tiles of the mosaic as far as the window shows them, in cells of the window. */
function partsIn({ mosaic, rect }: Plan): Part[] {
  return mosaic.parts.flatMap((part) => {
    const shared = cut(part, rect);
    if (shared.width < 1 || shared.height < 1) return [];
    return [{ ...part, ...shared, column: shared.column - rect.column, row: shared.row - rect.row }];
  });
}
