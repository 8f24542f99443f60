import { expect, it } from 'vitest';
import { surveyTile, tileRoom } from '../../src/core/tile-survey.ts';
import { tileWindow } from '../../src/core/tile-window.ts';
import { gridOfCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

const terrain = terrainFromText('1 6 2 \n 7 9 8 \n 3 5 0');

function surveyed(column: number, row: number, width: number, height: number, neighbours: 4 | 8 = 8) {
  return surveyTile(
    tileWindow(gridOfCase(terrain), { column, row, width, height }, neighbours, []),
    tileRoom(3),
  );
}

it('a tile keeps the lowest sills that span its catchments, lowest first, and closes no circle', () => {
  const tile = surveyed(0, 0, 3, 3);
  expect([...tile.pitCell]).toEqual([0, 2, 6, 8]);
  // 1 and 2 meet at 6, 3 and 0 at 5, and the two pairs at 7; the 8 and the 9 would close circles.
  expect([...tile.sillElevationM]).toEqual([5, 6, 7]);
  expect([...tile.sillCell]).toEqual([7, 1, 3]);
  const labels = [...tile.sillLabel].map((label, i) => [label, tile.otherLabel[i]].sort());
  expect(labels).toEqual([
    [2, 3],
    [0, 1],
    [0, 2],
  ]);
});

it('sills to the next tile lead to halo cells under provisional labels', () => {
  const tile = surveyed(0, 0, 2, 1, 4);
  expect([...tile.pitCell]).toEqual([0]);
  expect([...tile.sillElevationM]).toEqual([6]);
  expect([...tile.otherCell]).toEqual([2]);
  expect([...tile.haloCell]).toEqual([2]);
  expect(tile.otherLabel[0]).toBe(1);
});
