import type { Grid } from '../core/grid.ts';

/** Vertical units that elevation files come in. `us-ft` is the US survey foot, 1200/3937 m. */
export type VerticalUnit = 'm' | 'ft' | 'us-ft';

/** A coordinate reference system as far as a terrain needs it. */
export interface Crs {
  readonly kind: 'geographic' | 'projected';
  /** For people: the EPSG name, or the citation in the file's keys. */
  readonly name: string;
  /** EPSG code, null for a user-defined system. */
  readonly epsg: number | null;
  /** Definition for proj4. */
  readonly proj4: string;
  /** Metres in one horizontal unit (projected systems only; 1 for metres, null for geographic). */
  readonly unitM: number | null;
  readonly semiMajorM: number;
  readonly semiMinorM: number;
}

/** The CRS keys of a GeoTIFF as they stood in the file, so that a copy says the same. */
export interface GeoKeyTags {
  /** Tag 34735, GeoKeyDirectory. */
  readonly directory: readonly number[];
  /** Tag 34736, GeoDoubleParams. */
  readonly doubles: readonly number[];
  /** Tag 34737, GeoAsciiParams. */
  readonly ascii: string;
}

/** Where a grid lies: outer north-west corner of its first cell and cell sizes, in units of the CRS. */
export interface Georeference {
  readonly crs: Crs;
  readonly west: number;
  readonly north: number;
  readonly cellWidth: number;
  readonly cellHeight: number;
  /** Values stood for points (PixelIsPoint); the corner above is already half a cell out. */
  readonly pixelIsPoint: boolean;
  readonly geoKeys: GeoKeyTags;
}

/** One elevation file as read. */
export interface TerrainFile {
  readonly name: string;
  /** SHA-256, hex: of the file when all of it was read, else of the list of byte ranges read with their hashes. */
  readonly sha256: string;
  readonly hashOf: 'file' | 'ranges';
}

/** Something about the terrain that its user should know, each a plain sentence. */
export interface Notice {
  readonly kind:
    | 'gap'
    | 'seam-step'
    | 'overview'
    | 'window'
    | 'duplicate-column'
    | 'vertical-datum'
    | 'vertical-scale'
    | 'absurd-value'
    | 'datum-shift';
  readonly message: string;
}

/** Elevation ready for a survey, with its place and its origin. */
export interface Terrain {
  readonly grid: Grid;
  readonly georeference: Georeference;
  readonly verticalUnit: VerticalUnit;
  /** The first file held depths, which became heights, so that the vertical CRS in its keys no longer fits. */
  readonly fromDepths: boolean;
  /** Name of the vertical datum, null when the file does not tell. */
  readonly verticalDatum: string | null;
  readonly files: readonly TerrainFile[];
  /** SHA-256 over grid shape, georeference and elevations (float32 metres), hex: the same terrain whatever file it came in. */
  readonly sha256: string;
  readonly notices: readonly Notice[];
  /** The file's last column repeated its first (360° + one cell); it was dropped and is restored on writing. */
  readonly droppedColumn: boolean;
}
