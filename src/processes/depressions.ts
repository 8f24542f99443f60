import { defineProcess, type JobContext } from '../host/index.ts';
import { cloudOptimizedGeoTiff } from '../raster/write-cog.ts';
import { brimLevelRaster } from './brim-raster.ts';
import { brimful } from './brimful.ts';
import { counted } from './counted.ts';
import { featureCollectionText, figure } from './geojson-text.ts';
import { keptPonds, pondFeatures, pourPointFeatures } from './pond-features.ts';
import { terrainInputs } from './terrain-inputs.ts';
import type { TerrainStore } from './terrain-store.ts';

const description = {
  id: 'depressions',
  version: '1.0.0',
  title: 'Find ponds and where they overflow',
  description:
    'Fills the terrain to the brim and reports every pond: where its water stands, to which level, how much it holds, at which pour point it overflows and which pond the overflow reaches next. A screening from terrain alone.',
  keywords: ['terrain', 'pond', 'pour point', 'capacity', 'drainage'],
  jobControlOptions: ['async-execute', 'dismiss'],
  outputTransmission: ['value', 'reference'],
  inputs: {
    ...terrainInputs,
    minDepth: {
      title: 'least depth at brim of ponds to write, metres',
      description: 'Ponds shallower than this are left out of the features; the summary counts them.',
      schema: { type: 'number', minimum: 0, default: 0 },
      minOccurs: 0,
    },
    minArea: {
      title: 'least area at brim of ponds to write, square metres',
      description:
        'Ponds with a smaller water surface are left out of the features; the summary counts them.',
      schema: { type: 'number', minimum: 0, default: 0 },
      minOccurs: 0,
    },
    minCapacity: {
      title: 'least capacity of ponds to write, cubic metres',
      description: 'Ponds that hold less are left out of the features; the summary counts them.',
      schema: { type: 'number', minimum: 0, default: 0 },
      minOccurs: 0,
    },
    nested: {
      title: 'whether to write ponds inside ponds too',
      description:
        'Without it only outermost ponds are written. On noisy ground there are thousands of ponds one inside the other, so combine it with least sizes.',
      schema: { type: 'boolean', default: false },
      minOccurs: 0,
    },
  },
  outputs: {
    ponds: {
      title: 'Ponds',
      description:
        'One MultiPolygon a pond, along cell edges, in CRS84, with its levels, sizes and what it spills into (with nested ponds, the pond beside it in the same parent).',
      schema: { type: 'object', contentMediaType: 'application/geo+json' },
    },
    'pour-points': {
      title: 'Pour points',
      description: 'The point at which each pond overflows.',
      schema: { type: 'object', contentMediaType: 'application/geo+json' },
    },
    'brim-level': {
      title: 'Brim level',
      description: 'Metres, float32, on the grid and in the CRS of the elevation; voids are NaN.',
      schema: {
        type: 'string',
        contentEncoding: 'binary',
        contentMediaType: 'image/tiff; application=geotiff; profile=cloud-optimized',
      },
    },
    summary: {
      title: 'Summary',
      description: 'Counts of cells and ponds; area and capacity of the outermost ponds before any filter.',
      schema: { type: 'object', contentMediaType: 'application/json' },
    },
  },
} as const;

/** Ponds, pour points and brim level of a terrain; see depressions.md. */
export const depressions = defineProcess({
  description,
  async run(inputs, context, store: TerrainStore) {
    const analysis = await brimful(inputs, context, store);
    const nested = inputs.nested;
    const kept = keptPonds(analysis, {
      depthM: inputs.minDepth,
      areaM2: inputs.minArea,
      capacityM3: inputs.minCapacity,
      nested,
    });
    context.progress(0.9, 'writing brim levels');
    await context.breathe();
    const bytes = cloudOptimizedGeoTiff(brimLevelRaster(analysis));
    await context.breathe();
    noteOutletLevels(analysis, context);
    return {
      ponds: { text: featureCollectionText(pondFeatures(analysis, kept, nested)) },
      'pour-points': { text: featureCollectionText(pourPointFeatures(analysis, kept)) },
      'brim-level': { bytes },
      summary: { json: summaryOf(analysis) },
    };
  },
});

function summaryOf({
  grid,
  survey,
  drainage,
  depressions: nodes,
  measures,
}: Awaited<ReturnType<typeof brimful>>): {
  [name: string]: number;
} {
  let ponds = 0;
  let outermostPonds = 0;
  let areaM2 = 0;
  let capacityM3 = 0;
  for (let node = 0; node < nodes.isPond.length; node++) {
    if (nodes.isPond[node] === 0) continue;
    ponds++;
    if (nodes.parent[node] >= 0) continue;
    outermostPonds++;
    areaM2 += measures.areaM2[node];
    capacityM3 += measures.capacityM3[node];
  }
  let ground = 0;
  let withoutOutlet = 0;
  survey.cells.forEach((cells, leaf) => {
    ground += cells;
    if (drainage.levelM[leaf] === Number.POSITIVE_INFINITY) withoutOutlet += cells;
  });
  const cells = grid.width * grid.height;
  return {
    width: grid.width,
    height: grid.height,
    cells,
    voids: cells - ground,
    cellsWithoutOutlet: withoutOutlet,
    ponds,
    outermostPonds,
    areaM2: figure(areaM2),
    capacityM3: figure(capacityM3),
  };
}

function noteOutletLevels(analysis: Awaited<ReturnType<typeof brimful>>, context: JobContext): void {
  const { grid, drainage, depressions: nodes } = analysis;
  let held = 0;
  for (let node = 0; node < nodes.isPond.length; node++) {
    if (nodes.isPond[node] === 0 || nodes.parent[node] >= 0) continue;
    const sillCell = drainage.tree.sillCell[nodes.pourSill[node]];
    if (nodes.spillElevationM[node] > grid.elevationM[sillCell]) held++;
  }
  if (held > 0) {
    context.note(
      `${counted(held, 'outermost pond stands', 'outermost ponds stand')} at the level of water outside an outlet (heldByOutlet); ${held === 1 ? 'its' : 'their'} capacity is no storage of the ground.`,
    );
  }
}
