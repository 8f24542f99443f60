import { expect, it } from 'vitest';
import { surveyOf } from '../../src/core/survey-grid.ts';
import { gridOfCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

it('two pieces become one only in the third tile that both reach', () => {
  const terrain = terrainFromText('. 1 1 . \n . 1 1 . \n 1 . . 1');
  const survey = surveyOf(gridOfCase(terrain), { tileSize: 2 });
  expect([...survey.voidCells]).toEqual([6]);
  expect([...survey.voidOnRim]).toEqual([1]);
});

it('each catchment keeps its lowest cell beside a piece over all tiles, the first where two are equal', () => {
  const terrain = terrainFromText('9 9 9 9 9 \n 5 4 4 3 1 \n 9 . . . 9 \n 9 9 9 9 9');
  for (const tileSize of [1, 2, 8]) {
    const survey = surveyOf(gridOfCase(terrain), { tileSize });
    const leaf = survey.leaf[9];
    const at = [...survey.besideLeaf].indexOf(leaf);
    expect([survey.besideCell[at], survey.besideElevationM[at]]).toEqual([9, 1]);
    const four = surveyOf(gridOfCase(terrain), { tileSize, neighbours: 4 });
    expect(Math.min(...four.besideElevationM)).toBe(3);
  }
});
