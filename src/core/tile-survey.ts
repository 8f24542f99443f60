import { highSlice, lowSlice, sliceConstant } from './exact-sum.ts';
import { type Labels, labelsOf } from './labels.ts';
import { allocatePacked, type Sections, viewPacked } from './packed.ts';
import { type ReceiverRoom, receiverRoom } from './receiver-room.ts';
import { receiversOf } from './receivers.ts';
import { type SillRoom, sillRoom, tileSills } from './tile-sills.ts';
import { cellAt, type TileWindow } from './tile-window.ts';
import { besideVoid, isOnRim, voidPiecesOf } from './void-pieces.ts';

const kind = 1;

/**
 * What one tile knows, as one buffer that can be transferred or kept. A *label* below `pits` is a pit of the
 * tile; the ones after it stand for the cells in `haloCell`. Cells are row-major indices of the whole grid.
 */
const layout = [
  /** column, row, width, height of the tile. */
  ['place', 'f64'],
  /** Label of each cell of the tile, row by row; −1 = void. */
  ['label', 'i32'],
  ['pitCell', 'f64'],
  ['pitElevationM', 'f32'],
  ['haloCell', 'f64'],
  /** Cells of the tile under each label, and the two slices of their area (empty on uniform grids). */
  ['cells', 'u32'],
  ['areaHighM2', 'f64'],
  ['areaLowM2', 'f64'],
  ['sillElevationM', 'f32'],
  ['sillCell', 'f64'],
  ['otherCell', 'f64'],
  ['sillLabel', 'i32'],
  ['otherLabel', 'i32'],
  /** Each label's lowest cell on the rim of the data. */
  ['rimLabel', 'i32'],
  ['rimCell', 'f64'],
  ['rimElevationM', 'f32'],
  /** Each label's lowest cell on a row that lies on a pole; pole 0 north, 1 south. */
  ['poleLabel', 'i32'],
  ['pole', 'u8'],
  ['poleCell', 'f64'],
  ['poleElevationM', 'f32'],
  /** Pieces of void: whether on the rim, whether of a gap between files, how many cells of the tile, and first cell. */
  ['voidOnRim', 'u8'],
  ['voidIsGap', 'u8'],
  ['voidCells', 'f64'],
  ['voidFirstCell', 'f64'],
  /** Void cells on the tile's perimeter and in its halo, with their piece: where pieces of two tiles are one. */
  ['sharedVoidCell', 'f64'],
  ['sharedVoidPiece', 'i32'],
  /** Each label's lowest cell beside each piece of void. */
  ['besideLabel', 'i32'],
  ['besidePiece', 'i32'],
  ['besideCell', 'f64'],
  ['besideElevationM', 'f32'],
] as const;

export type TileSurvey = Sections<typeof layout> & { readonly buffer: ArrayBuffer };

/** Buffers that serve tile after tile of at most `side × side` cells. */
export interface TileRoom {
  readonly receivers: ReceiverRoom;
  readonly sills: SillRoom;
  readonly label: Int32Array;
}

export function tileRoom(side: number): TileRoom {
  const cells = (side + 2) * (side + 2);
  return { receivers: receiverRoom(cells), sills: sillRoom(cells), label: new Int32Array(cells) };
}

/** Surveys one tile: receivers, labels, sills with their spanning forest, and what lies at the edges of the data. */
export function surveyTile(window: TileWindow, room: TileRoom): TileSurvey {
  const { tile, grid, elevationM: z } = window;
  const stride = tile.width + 2;
  const receivers = receiversOf(window, room.receivers);
  const labels = labelsOf(window, receivers, room.label.subarray(0, z.length));
  const sills = tileSills(window, receivers, labels, room.sills);
  const pieces = voidPiecesOf(window);
  const beside = besideVoid(window, labels, pieces);
  const rim = lowestAlong(window, labels, (r, c) => isOnRim(window, r, c));
  const northPole = tile.row === 0 && grid.north === 'pole-row';
  const southPole = tile.row + tile.height === grid.height && grid.south === 'pole-row';
  const poles = [
    northPole ? lowestAlong(window, labels, (r) => r === 1) : [],
    southPole ? lowestAlong(window, labels, (r) => r === tile.height) : [],
  ];
  const pole = poles.flat();
  const shared = pieces.count === 0 ? [] : sharedVoid(window, pieces.piece);
  const labelCount = labels.pitCount + labels.halo.length;
  const areas = window.uniform ? 0 : labelCount;
  const { buffer, sections } = allocatePacked(kind, layout, {
    place: 4,
    label: tile.width * tile.height,
    pitCell: labels.pitCount,
    pitElevationM: labels.pitCount,
    haloCell: labels.halo.length,
    cells: labelCount,
    areaHighM2: areas,
    areaLowM2: areas,
    sillElevationM: sills.elevationM.length,
    sillCell: sills.elevationM.length,
    otherCell: sills.elevationM.length,
    sillLabel: sills.elevationM.length,
    otherLabel: sills.elevationM.length,
    rimLabel: rim.length,
    rimCell: rim.length,
    rimElevationM: rim.length,
    poleLabel: pole.length,
    pole: pole.length,
    poleCell: pole.length,
    poleElevationM: pole.length,
    voidOnRim: pieces.count,
    voidIsGap: pieces.count,
    voidCells: pieces.count,
    voidFirstCell: pieces.count,
    sharedVoidCell: shared.length,
    sharedVoidPiece: shared.length,
    besideLabel: beside.length,
    besidePiece: beside.length,
    besideCell: beside.length,
    besideElevationM: beside.length,
  });
  const cell = (position: number): number => cellAt(position, tile, grid);
  sections.place.set([tile.column, tile.row, tile.width, tile.height]);
  for (let r = 0; r < tile.height; r++) {
    const from = (r + 1) * stride + 1;
    sections.label.set(labels.label.subarray(from, from + tile.width), r * tile.width);
  }
  for (let p = 0; p < labels.pitCount; p++) {
    sections.pitCell[p] = cell(receivers.pits[p]);
    sections.pitElevationM[p] = z[receivers.pits[p]];
  }
  labels.halo.forEach((position, i) => {
    sections.haloCell[i] = cell(position);
  });
  sumCatchments(window, sections);
  sections.sillElevationM.set(sills.elevationM);
  sections.sillCell.set(sills.sillCell);
  sections.otherCell.set(sills.otherCell);
  sections.sillLabel.set(sills.sillLabel);
  sections.otherLabel.set(sills.otherLabel);
  rim.forEach((position, i) => {
    sections.rimLabel[i] = labels.label[position];
    sections.rimCell[i] = cell(position);
    sections.rimElevationM[i] = z[position];
  });
  pole.forEach((position, i) => {
    sections.poleLabel[i] = labels.label[position];
    sections.pole[i] = i < poles[0].length ? 0 : 1;
    sections.poleCell[i] = cell(position);
    sections.poleElevationM[i] = z[position];
  });
  sections.voidOnRim.set(pieces.onRim);
  sections.voidIsGap.set(pieces.isGap);
  sections.voidCells.set(pieces.cells);
  sections.voidFirstCell.set(pieces.firstCell);
  shared.forEach((position, i) => {
    sections.sharedVoidCell[i] = cell(position);
    sections.sharedVoidPiece[i] = pieces.piece[position];
  });
  beside.forEach(({ label, piece, position }, i) => {
    sections.besideLabel[i] = label;
    sections.besidePiece[i] = piece;
    sections.besideCell[i] = cell(position);
    sections.besideElevationM[i] = z[position];
  });
  return { buffer, ...sections };
}

/** A tile survey from its buffer. @throws OverbrimError `unreadable` on another kind or version. */
export function viewTileSurvey(buffer: ArrayBuffer): TileSurvey {
  return { buffer, ...viewPacked(buffer, kind, layout) };
}

function sumCatchments(window: TileWindow, sections: Sections<typeof layout>): void {
  const { width, height } = window.tile;
  const { label, cells, areaHighM2, areaLowM2 } = sections;
  const constant = sliceConstant(window.areaBoundM2);
  for (let r = 0; r < height; r++) {
    const high = highSlice(window.areaM2[r], constant);
    const low = lowSlice(window.areaM2[r], high, constant);
    for (let i = r * width; i < (r + 1) * width; i++) {
      const l = label[i];
      if (l < 0) continue;
      cells[l]++;
      if (window.uniform) continue;
      areaHighM2[l] += high;
      areaLowM2[l] += low;
    }
  }
}

/** The lowest window position under each label among the perimeter cells that a test picks. */
function lowestAlong(window: TileWindow, labels: Labels, picks: (r: number, c: number) => boolean): number[] {
  const { tile, elevationM: z } = window;
  const lowest = new Map<number, number>();
  forEachOnPerimeter(tile.width, tile.height, (r, c) => {
    const position = r * (tile.width + 2) + c;
    if (z[position] !== z[position] || !picks(r, c)) return;
    const held = lowest.get(labels.label[position]);
    if (held === undefined || z[position] < z[held] || (z[position] === z[held] && position < held)) {
      lowest.set(labels.label[position], position);
    }
  });
  return [...lowest.values()];
}

/** Void positions on the perimeter and in the halo. */
function sharedVoid(window: TileWindow, piece: Int32Array): number[] {
  const { width, height } = window.tile;
  const found: number[] = [];
  const take = (r: number, c: number): void => {
    const position = r * (width + 2) + c;
    if (piece[position] >= 0) found.push(position);
  };
  forEachOnPerimeter(width, height, take);
  forEachOnPerimeter(width + 2, height + 2, (r, c) => take(r - 1, c - 1));
  return found;
}

/** Visits the perimeter of a rectangle whose first row and column are 1, each cell once. */
function forEachOnPerimeter(width: number, height: number, visit: (r: number, c: number) => void): void {
  for (let c = 1; c <= width; c++) visit(1, c);
  for (let r = 2; r < height; r++) {
    visit(r, 1);
    if (width > 1) visit(r, width);
  }
  if (height > 1) for (let c = 1; c <= width; c++) visit(height, c);
}
