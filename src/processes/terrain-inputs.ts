import type { InputDescription, InputsOf } from '../host/index.ts';

/** Levels are kept as float32, which ends at 3.4e38. */
const levelSchema = { type: 'number', minimum: -3.4e38, maximum: 3.4e38 } as const;

/** Inputs that every process on a terrain takes: the elevation, and where its water may leave. */
export const terrainInputs = {
  terrain: {
    title: 'elevation file, or several as one mosaic',
    description:
      'Path or URL of a GeoTIFF with one band of ground elevations. Several files with the same CRS, cell size and alignment form one terrain; where they overlap the first named wins.',
    schema: { type: 'string', pattern: '\\S', contentMediaType: 'image/tiff; application=geotiff' },
    maxOccurs: 'unbounded',
  },
  verticalUnit: {
    title: 'unit of the elevations: m, ft or us-ft',
    description:
      'Needed when the file itself does not name its vertical unit. It is never taken from the horizontal unit. us-ft is the US survey foot, 1200/3937 m.',
    schema: { type: 'string', enum: ['m', 'ft', 'us-ft'] },
    minOccurs: 0,
  },
  extent: {
    title: 'part of the terrain to analyse, as west,south,east,north',
    description: 'In the CRS of the terrain; cells that touch it are read. Without it the whole terrain is.',
    schema: { type: 'string' },
    minOccurs: 0,
  },
  cellBudget: {
    title: 'most cells to analyse',
    description:
      'When the terrain has more, the finest overview in the file that fits is taken; its averaged elevations make the result an estimate.',
    schema: { type: 'integer', minimum: 1 },
    minOccurs: 0,
  },
  edges: {
    title: 'whether water leaves over the edge of the data: open or closed',
    description: 'At open edges a catchment drains over its lowest cell on the rim; closed edges are walls.',
    schema: { type: 'string', enum: ['open', 'closed'], default: 'open' },
    minOccurs: 0,
  },
  neighbours: {
    title: 'neighbours that water runs to: 8 or 4',
    description: 'With 8, water also runs diagonally between cells; with 4 only across sides.',
    schema: { type: 'integer', enum: [8, 4], default: 8 },
    minOccurs: 0,
  },
  voids: {
    title: 'what cells without elevation are: rim, walls or all',
    description:
      'rim: voids joined to the edge of the data are like the edge, enclosed ones are walls. walls: all voids are walls. all: all voids take water.',
    schema: { type: 'string', enum: ['rim', 'walls', 'all'], default: 'rim' },
    minOccurs: 0,
  },
  gaps: {
    title: 'what narrow gaps between the files of a mosaic are: walls or open',
    description:
      'Up to 3 cells without elevation between two files are taken for a fault of the tiling. Open, water leaves through them; one such gap can empty a basin.',
    schema: { type: 'string', enum: ['walls', 'open'], default: 'walls' },
    minOccurs: 0,
  },
  outlets: {
    title: 'further outlets: GeoJSON file, x,y, voids or deepest',
    description:
      'Where water leaves for good besides the edges: a GeoJSON file (CRS84) of points, lines or polygons, each with an optional level in metres as the property levelM; a place x,y in the CRS of the terrain or of the input crs; voids for all cells without elevation; deepest for the lowest cell.',
    schema: { type: 'string', pattern: '\\S' },
    minOccurs: 0,
    maxOccurs: 'unbounded',
  },
  edgeLevel: {
    title: 'level of the water beyond the edge, metres',
    description:
      'Where it stands higher than the ground at an open edge, water leaves at this level; in voids joined to the edge too, unless voidLevel says otherwise. Without it the ground decides.',
    schema: levelSchema,
    minOccurs: 0,
  },
  voidLevel: {
    title: 'level of the water in voids that take water, metres',
    description: 'Where it stands higher than the ground beside them, water leaves at this level.',
    schema: levelSchema,
    minOccurs: 0,
  },
  outletLevel: {
    title: 'level of the water at further outlets, metres',
    description: 'For the input outlets, where a feature names no level of its own.',
    schema: levelSchema,
    minOccurs: 0,
  },
  crs: {
    title: 'CRS of typed coordinates, as EPSG:code',
    description:
      'CRS of x,y in other inputs, x always first (EPSG:4326: longitude, latitude). Without it they are in the CRS of the terrain.',
    schema: { type: 'string', pattern: '^EPSG:[0-9]{4,6}$' },
    minOccurs: 0,
  },
} as const satisfies Record<string, InputDescription>;

/** Their values after checking. */
export type TerrainInputs = InputsOf<typeof terrainInputs>;
