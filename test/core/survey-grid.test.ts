import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { surveyOf, surveySteps } from '../../src/core/survey-grid.ts';
import { gridOfCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

const grid = gridOfCase(terrainFromText('9 9 9 9 9 \n 9 1 5 2 9 \n 9 9 9 9 7'));

describe('the survey of a grid', () => {
  it('numbers leaves by their pits and keeps the sills between them', () => {
    const survey = surveyOf(grid);
    expect([survey.width, survey.height, survey.neighbours, survey.wraps, survey.leaves]).toEqual([
      5,
      3,
      8,
      false,
      2,
    ]);
    expect([...survey.pitCell]).toEqual([6, 8]);
    expect([...survey.pitElevationM]).toEqual([1, 2]);
    // The sill is the cell of 5 between them, which itself runs down to the 1.
    expect([...survey.elevationM]).toEqual([5]);
    expect([...survey.sillCell]).toEqual([7]);
    expect([...survey.otherCell]).toEqual([8]);
    expect([...survey.sillLeaf, ...survey.otherLeaf]).toEqual([0, 1]);
    expect(survey.cells.reduce((a, b) => a + b)).toBe(15);
    expect([...survey.rimElevationM]).toEqual([9, 7]);
    expect([...survey.rimCell]).toEqual([0, 14]);
  });

  it('comes in steps of one tile that tell the share done', () => {
    const steps = surveySteps(grid, { tileSize: 2 });
    const shares: number[] = [];
    for (let step = steps.next(); ; step = steps.next()) {
      if (step.done) {
        expect(step.value.leaves).toBe(2);
        break;
      }
      shares.push(step.value);
    }
    expect(shares).toEqual([1, 2, 3, 4, 5, 6].map((n) => n / 6));
  });

  it.each([0, 513, 2.5, -3, Number.NaN])('refuses a tile size of %s in a sentence', (tileSize) => {
    expect(() => surveyOf(grid, { tileSize })).toThrow(
      new OverbrimError(
        'bad-input',
        `The tile size is ${tileSize}; expected a whole number of cells from 1 to 512.`,
      ),
    );
  });
});
