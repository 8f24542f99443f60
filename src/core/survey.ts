import type { Sills } from './forest.ts';
import type { Neighbours } from './grid.ts';
import { allocatePacked, type Sections, viewPacked } from './packed.ts';

const kind = 2;

/**
 * The catchments, the sills between them and the edges of the data of one terrain, as one buffer. Leaves are
 * numbered by their pit's row-major index; all per-leaf arrays have one value a leaf. Outlets play no part in it.
 */
const layout = [
  /** width, height, neighbours (4 or 8), wraps (0 or 1), number of leaves. */
  ['head', 'f64'],
  /** Leaf of each cell, row by row; −1 = void. */
  ['leaf', 'i32'],
  /** Cells that were made pits, ascending. */
  ['madePits', 'f64'],
  ['pitCell', 'f64'],
  ['pitElevationM', 'f32'],
  ['cells', 'f64'],
  ['areaM2', 'f64'],
  /** The spanning forest of sills, lowest first (see forest.ts). */
  ['elevationM', 'f32'],
  ['sillCell', 'f64'],
  ['otherCell', 'f64'],
  ['sillLeaf', 'i32'],
  ['otherLeaf', 'i32'],
  /** Each leaf's lowest cell on the rim of the data, where it has one; by leaf. */
  ['rimLeaf', 'i32'],
  ['rimCell', 'f64'],
  ['rimElevationM', 'f32'],
  /** Pieces of void (8-connected) by their first cell in row order: whether they reach the rim, are of a gap between files, and cells. */
  ['voidOnRim', 'u8'],
  ['voidIsGap', 'u8'],
  ['voidCells', 'f64'],
  /** Each leaf's lowest cell beside each piece of void; by leaf, then piece. */
  ['besideLeaf', 'i32'],
  ['besidePiece', 'i32'],
  ['besideCell', 'f64'],
  ['besideElevationM', 'f32'],
] as const;

export type SurveySections = Sections<typeof layout>;
export type Survey = SurveySections & Sills & SurveyHead & { readonly buffer: ArrayBuffer };

export interface SurveyHead {
  readonly width: number;
  readonly height: number;
  readonly neighbours: Neighbours;
  readonly wraps: boolean;
  readonly leaves: number;
}

/** Room for a survey of known sizes. */
export function allocateSurvey(
  head: SurveyHead,
  lengths: { madePits: number; sills: number; rim: number; voids: number; beside: number },
): { buffer: ArrayBuffer; sections: SurveySections } {
  const { leaves } = head;
  const { madePits, sills, rim, voids, beside } = lengths;
  const packed = allocatePacked(kind, layout, {
    head: 5,
    leaf: head.width * head.height,
    madePits,
    pitCell: leaves,
    pitElevationM: leaves,
    cells: leaves,
    areaM2: leaves,
    elevationM: sills,
    sillCell: sills,
    otherCell: sills,
    sillLeaf: sills,
    otherLeaf: sills,
    rimLeaf: rim,
    rimCell: rim,
    rimElevationM: rim,
    voidOnRim: voids,
    voidIsGap: voids,
    voidCells: voids,
    besideLeaf: beside,
    besidePiece: beside,
    besideCell: beside,
    besideElevationM: beside,
  });
  packed.sections.head.set([head.width, head.height, head.neighbours, head.wraps ? 1 : 0, leaves]);
  return packed;
}

/** A survey from its buffer. @throws OverbrimError `unreadable` on another kind or version. */
export function viewSurvey(buffer: ArrayBuffer): Survey {
  const sections = viewPacked(buffer, kind, layout);
  const [width, height, neighbours, wraps, leaves] = sections.head;
  return {
    buffer,
    ...sections,
    width,
    height,
    neighbours: neighbours === 4 ? 4 : 8,
    wraps: wraps === 1,
    leaves,
  };
}
