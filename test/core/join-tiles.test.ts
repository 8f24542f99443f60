import { describe, expect, it } from 'vitest';
import { ReceiverField } from '../../src/core/receiver-field.ts';
import { surveyOf } from '../../src/core/survey-grid.ts';
import { check } from './property/check.ts';
import { around } from './property/oracle-grid.ts';
import { gridOfCase, type TerrainCase, terrainCases } from './property/terrain-case.ts';

const noPoleRow = (side: TerrainCase['north']): TerrainCase['north'] => (side === 'pole-row' ? 'pole' : side);
const cases = terrainCases({ width: 10, height: 9 }).map(
  (terrain): TerrainCase => ({
    ...terrain,
    north: noPoleRow(terrain.north),
    south: noPoleRow(terrain.south),
  }),
);

/** Whether cell a is higher than cell b in the total order: by elevation, then by index. */
function isHigher({ z }: TerrainCase, a: number, b: number): boolean {
  return z[a] > z[b] || (z[a] === z[b] && a > b);
}

/** All passes between touching cells of different leaves, in their total order. */
function allPasses(terrain: TerrainCase, leaf: ArrayLike<number>): { sill: number; other: number }[] {
  const { z, neighbours } = terrain;
  const passes: { sill: number; other: number }[] = [];
  z.forEach((_, sill) => {
    for (const other of around(terrain, sill, neighbours)) {
      if (leaf[sill] < 0 || leaf[other] < 0 || leaf[sill] === leaf[other]) continue;
      if (isHigher(terrain, sill, other)) passes.push({ sill, other });
    }
  });
  return passes.sort((a, b) => z[a.sill] - z[b.sill] || a.sill - b.sill || a.other - b.other);
}

describe.each([2, 5, 256])('a survey joined from tiles of %i', (tileSize) => {
  it('has leaves by pit, whose cells run there', () => {
    check(1000, cases, (terrain) => {
      const { neighbours, madePits, z } = terrain;
      const grid = gridOfCase(terrain);
      const survey = surveyOf(grid, { neighbours, madePits, tileSize });
      const field = new ReceiverField(grid, neighbours, madePits);
      const pits = [...z.keys()].filter((cell) => !Number.isNaN(z[cell]) && field.receiver(cell) === cell);
      expect([...survey.pitCell]).toEqual(pits);
      expect([...survey.pitElevationM]).toEqual(pits.map((cell) => grid.elevationM[cell]));
      const cells = new Array<number>(pits.length).fill(0);
      z.forEach((value, cell) => {
        const leaf = survey.leaf[cell];
        if (Number.isNaN(value)) expect(leaf).toBe(-1);
        else {
          expect(survey.leaf[field.receiver(cell)]).toBe(leaf);
          cells[leaf]++;
        }
      });
      expect([...survey.cells]).toEqual(cells);
    });
  });

  it('keeps exactly the sills that spanning all passes between touching cells keeps (Kruskal 1956)', () => {
    check(1000, cases, (terrain) => {
      const { neighbours, madePits, z } = terrain;
      const survey = surveyOf(gridOfCase(terrain), { neighbours, madePits, tileSize });
      const set = Array.from({ length: survey.leaves }, (_, leaf) => leaf);
      const kept = allPasses(terrain, survey.leaf).filter(({ sill, other }) => {
        const [a, b] = [set[survey.leaf[sill]], set[survey.leaf[other]]];
        set.forEach((s, leaf) => {
          if (s === b) set[leaf] = a;
        });
        return a !== b;
      });
      expect([...survey.sillCell]).toEqual(kept.map(({ sill }) => sill));
      expect([...survey.otherCell]).toEqual(kept.map(({ other }) => other));
      expect([...survey.elevationM]).toEqual(kept.map(({ sill }) => z[sill] + 0));
      expect([...survey.sillLeaf]).toEqual(kept.map(({ sill }) => survey.leaf[sill]));
      expect([...survey.otherLeaf]).toEqual(kept.map(({ other }) => survey.leaf[other]));
    });
  });
});
