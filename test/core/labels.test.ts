import { describe, expect, it } from 'vitest';
import { haloLabel, labelsOf, noLabel } from '../../src/core/labels.ts';
import { receiverRoom } from '../../src/core/receiver-room.ts';
import { receiversOf } from '../../src/core/receivers.ts';
import { type Tile, tileWindow } from '../../src/core/tile-window.ts';
import { gridOfCase, type TerrainCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

function labelled(terrain: TerrainCase, tile: Tile) {
  const window = tileWindow(gridOfCase(terrain), tile, terrain.neighbours, terrain.madePits);
  const cells = window.elevationM.length;
  return labelsOf(window, receiversOf(window, receiverRoom(cells)), new Int32Array(cells));
}

/** Labels of the tile's own cells, row by row. */
function inside({ width, height }: Tile, label: Int32Array): number[] {
  return Array.from(
    { length: width * height },
    (_, i) => label[(Math.floor(i / width) + 1) * (width + 2) + (i % width) + 1],
  );
}

describe('labels', () => {
  it('are the pits, row by row, and none on void', () => {
    const tile = { column: 0, row: 0, width: 5, height: 2 };
    const { label, pitCount, halo } = labelled(terrainFromText('5 4 9 . 1 \n 3 9 9 9 2'), tile);
    expect(pitCount).toBe(2);
    expect(halo).toEqual([]);
    expect(inside(tile, label)).toEqual([1, 1, 1, noLabel, 0, 1, 1, 1, 0, 0]);
  });

  it('go on in the halo under provisional labels, one a halo cell', () => {
    const tile = { column: 0, row: 0, width: 2, height: 2 };
    const { label, pitCount, halo } = labelled(terrainFromText('5 4 3 \n 8 7 1 \n 9 9 9'), tile);
    expect(pitCount).toBe(0);
    expect(inside(tile, label)).toEqual([0, 0, 0, 0]);
    // Window of 4 columns: row 2, column 3 is the cell of elevation 1.
    expect(halo).toEqual([2 * 4 + 3]);
  });

  it('give a halo cell its provisional label when first asked for', () => {
    const tile = { column: 0, row: 0, width: 2, height: 1 };
    const labels = labelled(terrainFromText('1 2 0'), tile);
    expect(labels.pitCount).toBe(1);
    expect(labels.halo).toEqual([7]);
    expect(haloLabel(labels, 7)).toBe(1);
    expect(haloLabel(labels, 3)).toBe(2);
    expect(haloLabel(labels, 3)).toBe(2);
    expect(labels.halo).toEqual([7, 3]);
  });
});
