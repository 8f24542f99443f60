import type { Feature, Position } from 'geojson';
import {
  spillPath as coreSpillPath,
  distanceM,
  type Grid,
  type SpillLeg,
  type SpillPath,
} from '../core/index.ts';
import { defineProcess, type Json } from '../host/index.ts';
import { cellCentre } from '../raster/place.ts';
import { type Brimful, brimful, terrainOf } from './brimful.ts';
import { degrees, featureCollectionText, figure, float32Figure } from './geojson-text.ts';
import { cellLonLat } from './lon-lat.ts';
import { pondNames } from './pond-names.ts';
import { terrainInputs } from './terrain-inputs.ts';
import type { TerrainStore } from './terrain-store.ts';
import { typedCell } from './typed-place.ts';

const description = {
  id: 'spill-path',
  version: '1.0.0',
  title: 'Trace where water runs and overflows',
  description:
    'From a place over land and through every pond on the way, from pour point to pour point, to an outlet; with the ponds brimful. A screening from terrain alone.',
  keywords: ['terrain', 'spill path', 'long section', 'overflow', 'drainage'],
  jobControlOptions: ['async-execute', 'dismiss'],
  outputTransmission: ['value', 'reference'],
  inputs: {
    ...terrainInputs,
    from: {
      title: 'start of the path, as x,y',
      description: 'A place in the CRS of the terrain or of the input crs.',
      schema: { type: 'string' },
    },
  },
  outputs: {
    'spill-path': {
      title: 'Spill path',
      description:
        'One line a leg, over land or through a pond, in CRS84, with length, drop, slope and storage to fill.',
      schema: { type: 'object', contentMediaType: 'application/geo+json' },
    },
    'long-section': {
      title: 'Long section',
      description: 'Ground and water surface along the path, cell by cell, and the sills on it.',
      schema: { type: 'object', contentMediaType: 'application/json' },
    },
  },
} as const;

/** The way of the overflow from a place; see spill-path.md. */
export const spillPath = defineProcess({
  description,
  async run(inputs, context, store: TerrainStore) {
    // A place outside the terrain should be told before the survey, not after it.
    const terrain = await terrainOf(inputs, context, store);
    const start = await typedCell(terrain, 'from', inputs.from, inputs.crs, store);
    const analysis = await brimful(inputs, context, store);
    const { grid, survey, drainage, depressions } = analysis;
    context.progress(0.9, 'tracing the path');
    await context.breathe();
    const found = coreSpillPath(grid, survey, drainage, depressions, start);
    const path = found.legs.length > 0 ? found : { ...found, legs: [standing(grid, start)] };
    if (path !== found) context.note('The path starts on an outlet, so water leaves there at once.');
    if (path.end === 'no-way') {
      context.note(
        'The path ends in a pit from which no way leads to any outlet, since voids or closed edges enclose it.',
      );
    }
    return {
      'spill-path': { text: featureCollectionText(legFeatures(analysis, path)) },
      'long-section': { json: longSection(analysis, path) },
    };
  },
});

/** The leg of water that leaves where it falls: one cell, so that the result tells where and how high that is. */
function standing(grid: Grid, cell: number): SpillLeg {
  const elevationM = grid.elevationM[cell];
  return {
    kind: 'land',
    cells: [cell],
    pond: -1,
    fromElevationM: elevationM,
    toElevationM: elevationM,
    lengthM: 0,
  };
}

function* legFeatures(analysis: Brimful, path: SpillPath): Generator<Feature> {
  const { survey, drainage, depressions, measures, terrain } = analysis;
  const nameOf = pondNames(survey, drainage, depressions);
  const position = cellLonLat(terrain);
  let number = 0;
  for (const leg of path.legs) {
    number++;
    const fromElevationM = float32Figure(leg.fromElevationM);
    const toElevationM = float32Figure(leg.toElevationM);
    const dropM = fromElevationM - toElevationM;
    yield {
      type: 'Feature',
      geometry: lineGeometry(leg.cells.map(position)),
      properties: {
        leg: number,
        kind: leg.kind,
        pond: leg.kind === 'pond' ? nameOf(leg.pond) : null,
        lengthM: figure(leg.lengthM),
        dropM: figure(dropM),
        slope: leg.lengthM > 0 ? figure(dropM / leg.lengthM) : 0,
        fromElevationM,
        toElevationM,
        storageM3: leg.kind === 'pond' ? figure(measures.capacityM3[leg.pond]) : 0,
        endsAt: number < path.legs.length ? null : path.end,
      },
    };
  }
}

/** A line, or several where it crosses the antimeridian. A leg of one cell repeats its position. */
function lineGeometry(positions: readonly Position[]): Feature['geometry'] {
  const parts: Position[][] = [[positions[0]]];
  for (let i = 1; i < positions.length; i++) {
    const [x0, y0] = positions[i - 1];
    const [x1, y1] = positions[i];
    const part = parts[parts.length - 1];
    if (Math.abs(x1 - x0) <= 180) part.push(positions[i]);
    else {
      const side = x0 > 0 ? 180 : -180;
      const beyond = x1 + 2 * side;
      const y = degrees(y0 + ((side - x0) / (beyond - x0)) * (y1 - y0));
      part.push([side, y]);
      parts.push([[-side, y], positions[i]]);
    }
  }
  for (const part of parts) if (part.length === 1) part.push(part[0]);
  return parts.length === 1
    ? { type: 'LineString', coordinates: parts[0] }
    : { type: 'MultiLineString', coordinates: parts };
}

function longSection(analysis: Brimful, path: SpillPath): Json {
  const { terrain, grid, survey, drainage, depressions } = analysis;
  const nameOf = pondNames(survey, drainage, depressions);
  const stations: Json[] = [];
  const sills: Json[] = [];
  let along = 0;
  const station = (leg: SpillLeg, number: number, cell: number): void => {
    const groundM = grid.elevationM[cell];
    const levelM = drainage.levelM[survey.leaf[cell]];
    const waterM = levelM < Number.POSITIVE_INFINITY ? Math.max(groundM, levelM) : groundM;
    const [x, y] = cellCentre(terrain, cell).map(figure);
    stations.push({
      leg: number,
      kind: leg.kind,
      distanceM: figure(along),
      x,
      y,
      groundM: float32Figure(groundM),
      waterM: float32Figure(waterM),
    });
  };
  path.legs.forEach((leg, index) => {
    leg.cells.forEach((cell, i) => {
      if (i > 0) along += distanceM(grid, leg.cells[i - 1], cell);
      if (i > 0 || index === 0) station(leg, index + 1, cell);
    });
    if (leg.kind === 'pond') {
      const sill = depressions.pourSill[leg.pond];
      const elevationM = float32Figure(drainage.tree.elevationM[sill]);
      sills.push({ distanceM: figure(along), elevationM, pond: nameOf(leg.pond) });
    }
  });
  return { crs: terrain.georeference.crs.name, lengthM: figure(along), endsAt: path.end, stations, sills };
}
