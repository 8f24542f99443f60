import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { pondOfCells } from '../../src/core/index.ts';
import { epsgFiles } from '../../src/node/epsg-files.ts';
import { fileSource } from '../../src/node/file-source.ts';
import { openTerrain } from '../../src/raster/open-terrain.ts';
import { filled, outermost } from './filled.ts';

/**
 * Source: the drawing of the invented town (demo/town), whose quarry is made of prisms along cell edges and whose low
 * places are set by hand; town.json is worked out from that drawing, never from an analysis.
 */
const folder = new URL('../../demo/town/', import.meta.url);
const town = JSON.parse(readFileSync(new URL('town.json', folder), 'utf8'));
const source = await fileSource(new URL('elevation.tif', folder).pathname);
const terrain = await openTerrain([source], { epsg: epsgFiles });
const brimful = filled(terrain.grid, 8);
const { depressions, measures, survey } = brimful;

interface DrawnPond {
  readonly name: string;
  readonly parent: string | null;
  readonly pit: { readonly column: number; readonly row: number };
  readonly spillElevationM: number;
  readonly depthM: number;
  readonly areaM2: number;
  readonly capacityM3: number;
}

const cellOf = ({ column, row }: { column: number; row: number }): number =>
  row * terrain.grid.width + column;

/** The node of a drawn pond: the one that holds its pit and spills at its level. */
function nodeOf({ pit, spillElevationM }: DrawnPond): number {
  let node = survey.leaf[cellOf(pit)];
  while (depressions.parent[node] >= 0 && depressions.spillElevationM[node] < spillElevationM) {
    node = depressions.parent[node];
  }
  return node;
}

describe('the quarry', () => {
  const ponds: DrawnPond[] = town.quarry.ponds;

  it.each(ponds.map((pond) => [pond.name, pond] as const))(
    '%s: level, depth, area and capacity exactly',
    (_, pond) => {
      const node = nodeOf(pond);
      expect(depressions.isPond[node]).toBe(1);
      expect(depressions.spillElevationM[node]).toBe(pond.spillElevationM);
      expect(depressions.spillElevationM[node] - depressions.pitElevationM[node]).toBe(pond.depthM);
      expect(measures.areaM2[node]).toBe(pond.areaM2);
      expect(measures.capacityM3[node]).toBe(pond.capacityM3);
    },
  );

  it('has each pit inside the pond that the drawing says', () => {
    for (const pond of ponds) {
      const parent = ponds.find(({ name }) => name === pond.parent);
      expect(depressions.parent[nodeOf(pond)], pond.name).toBe(parent === undefined ? -1 : nodeOf(parent));
    }
  });

  it('has no pond but the drawn ones, so that a bench in the east cut is none', () => {
    const [quarry] = ponds;
    const inside = [...depressions.isPond.keys()].filter((node) => {
      let top = node;
      while (depressions.parent[top] >= 0) top = depressions.parent[top];
      return depressions.isPond[node] === 1 && top === nodeOf(quarry);
    });
    expect(inside.sort()).toEqual(ponds.map(nodeOf).sort());
  });
});

it('finds ponds of sensible size all over the town', () => {
  const sizeable = outermost(brimful).filter(
    (node) =>
      measures.areaM2[node] >= 200 &&
      depressions.spillElevationM[node] - depressions.pitElevationM[node] >= 0.3,
  );
  expect(sizeable.length).toBeGreaterThanOrEqual(30);
});

it('gives every wet cell to one outermost pond', () => {
  const pond = pondOfCells(terrain.grid, survey, brimful.drainage, depressions, false);
  const cells = new Map<number, number>();
  for (const node of pond) if (node >= 0) cells.set(node, (cells.get(node) ?? 0) + 1);
  for (const node of outermost(brimful)) expect(cells.get(node)).toBe(measures.cells[node]);
});

/** The outermost pond over a place, and the cell where it overflows. */
function pondAt(place: { column: number; row: number }): { node: number; sill: number } {
  let node: number = survey.leaf[cellOf(place)];
  while (depressions.parent[node] >= 0) node = depressions.parent[node];
  return { node, sill: brimful.drainage.tree.sillCell[depressions.pourSill[node]] };
}

it('fills the detention basin to its weir, with the capacity of its prism', () => {
  const { node, sill } = pondAt(town.basin.floor);
  expect(depressions.spillElevationM[node]).toBe(town.basin.weirM);
  expect(measures.capacityM3[node]).toBe(town.basin.capacityM3);
  expect(terrain.grid.elevationM[sill]).toBe(town.basin.weirM);
});

it('lets the ground behind the levee overflow at its low place', () => {
  const { elevationM, columns, row } = town.levee.lowPlace;
  const over = outermost(brimful).filter((node) => {
    const sill = brimful.drainage.tree.sillCell[depressions.pourSill[node]];
    const column = sill % terrain.grid.width;
    const isThere =
      column >= columns[0] &&
      column <= columns[1] &&
      Math.abs(Math.floor(sill / terrain.grid.width) - row) <= 6;
    return isThere && depressions.spillElevationM[node] === elevationM;
  });
  expect(over.length).toBeGreaterThanOrEqual(1);
});

it('ponds behind the embankment without a culvert up to its lowest crest', () => {
  const levels = outermost(brimful).filter(
    (node) => depressions.spillElevationM[node] === town.embankment.lowestCrestM,
  );
  const largest = Math.max(...levels.map((node) => measures.areaM2[node]));
  expect(largest).toBeGreaterThan(1000);
});
