import { expect, it } from 'vitest';
import { viewSurvey } from '../../src/core/survey.ts';
import { surveyOf } from '../../src/core/survey-grid.ts';
import { surveyTile, tileRoom, viewTileSurvey } from '../../src/core/tile-survey.ts';
import { tileWindow } from '../../src/core/tile-window.ts';
import { gridOfCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

const grid = gridOfCase(
  terrainFromText('9 9 9 9 \n 9 1 . 9 \n 9 9 9 3', { wraps: true, metrics: 'geographic' }),
);

it('a survey comes back whole from its buffer', () => {
  const survey = surveyOf(grid, { neighbours: 4, madePits: [5] });
  const back = viewSurvey(structuredClone(survey.buffer));
  expect(back).toEqual(survey);
  expect([back.neighbours, back.wraps, back.width, back.height]).toEqual([4, true, 4, 3]);
  expect([...back.madePits]).toEqual([5]);
});

it('so does that of a tile, and neither is taken for the other', () => {
  const tile = surveyTile(tileWindow(grid, { column: 0, row: 0, width: 3, height: 2 }, 8, []), tileRoom(3));
  expect(viewTileSurvey(structuredClone(tile.buffer))).toEqual(tile);
  const refusal =
    /^A packed structure starts with the words .*; expected .*, so make it again with this version\.$/;
  expect(() => viewSurvey(tile.buffer)).toThrow(refusal);
  expect(() => viewTileSurvey(surveyOf(grid).buffer)).toThrow(refusal);
});
