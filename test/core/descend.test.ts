import { expect, it } from 'vitest';
import { descend } from '../../src/core/descend.ts';
import { descendByKeys } from '../../src/core/descend-by-keys.ts';
import { receiverRoom } from '../../src/core/receiver-room.ts';
import { tilesOf, tileWindow } from '../../src/core/tile-window.ts';
import { check } from './property/check.ts';
import { gridOfCase, terrainCases } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

it('the quick pass has the same bits as the plain one, wherever it takes a tile', () => {
  let taken = 0;
  check(2000, terrainCases({ width: 12, height: 11 }), (terrain) => {
    const grid = gridOfCase(terrain);
    for (const tile of tilesOf(terrain.width, terrain.height, 5)) {
      const window = tileWindow(grid, tile, terrain.neighbours, []);
      const [plain, quick] = [receiverRoom(49), receiverRoom(49)];
      descend(window, plain);
      if (!descendByKeys(window, quick)) continue;
      taken++;
      expect(quick.to).toEqual(plain.to);
      expect(quick.lower).toEqual(plain.lower);
    }
  });
  expect(taken).toBeGreaterThan(2000);
});

it('the quick pass refuses elevations too far apart for its differences', () => {
  const quick = (text: string): boolean => {
    const grid = gridOfCase(terrainFromText(text));
    return descendByKeys(tileWindow(grid, tilesOf(grid.width, grid.height, 8)[0], 8, []), receiverRoom(100));
  };
  expect(quick('-1e30 . 1e30')).toBe(false);
  expect(quick('-10 . 3000')).toBe(false);
  expect(quick('1e-30 . 1e30')).toBe(true);
  expect(quick('-3000 . -10')).toBe(true);
});
