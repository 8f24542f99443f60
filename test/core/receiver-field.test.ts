import { expect, it } from 'vitest';
import { ReceiverField } from '../../src/core/receiver-field.ts';
import { surveyOf } from '../../src/core/survey-grid.ts';
import { check } from './property/check.ts';
import { gridOfCase, terrainCases } from './property/terrain-case.ts';

it('receivers asked for one by one lead from every cell to the pit of its catchment', () => {
  // Larger than one block of the field, so that ways cross from block to block.
  check(150, terrainCases({ width: 70, height: 40 }), (terrain) => {
    const grid = gridOfCase(terrain);
    const { neighbours, madePits } = terrain;
    const survey = surveyOf(grid, { neighbours, madePits });
    const field = new ReceiverField(grid, neighbours, madePits);
    terrain.z.forEach((z, cell) => {
      if (Number.isNaN(z)) {
        expect(field.receiver(cell)).toBe(cell);
        return;
      }
      let at = cell;
      while (field.receiver(at) !== at) at = field.receiver(at);
      if (survey.pitCell[survey.leaf[cell]] !== at) expect(at).toBe(survey.pitCell[survey.leaf[cell]]);
    });
  });
});
