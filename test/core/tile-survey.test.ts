import { expect, it } from 'vitest';
import { surveyTile, tileRoom } from '../../src/core/tile-survey.ts';
import { tileWindow } from '../../src/core/tile-window.ts';
import { gridOfCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

it("a tile knows its place, its catchments' sizes and its lowest rim cells", () => {
  const grid = gridOfCase(terrainFromText('1 6 2 \n 7 9 8 \n 3 5 0'));
  const tile = surveyTile(tileWindow(grid, { column: 1, row: 0, width: 2, height: 3 }, 4, []), tileRoom(3));
  expect([...tile.place]).toEqual([1, 0, 2, 3]);
  expect([...tile.label].length).toBe(6);
  expect(tile.cells.reduce((a, b) => a + b)).toBe(6);
  expect([...tile.pitElevationM]).toEqual([2, 0]);
  const rim = Object.fromEntries(
    [...tile.rimLabel].map((label, i) => [label, [tile.rimCell[i], tile.rimElevationM[i]]]),
  );
  expect(rim[0]).toEqual([2, 2]);
  expect(rim[1]).toEqual([8, 0]);
});

it('buffers that served one tile serve the next without a trace', () => {
  const grid = gridOfCase(terrainFromText('1 6 2 4 \n 7 9 . 8 \n 3 5 0 1'));
  const used = tileRoom(3);
  surveyTile(tileWindow(grid, { column: 0, row: 0, width: 3, height: 3 }, 8, [4]), used);
  const tile = { column: 2, row: 1, width: 2, height: 2 };
  const again = surveyTile(tileWindow(grid, tile, 8, []), used);
  expect(again).toEqual(surveyTile(tileWindow(grid, tile, 8, []), tileRoom(3)));
});
