import { describe, expect, it } from 'vitest';
import { surveyOf } from '../../src/core/survey-grid.ts';
import { check } from './property/check.ts';
import { around, isOnRim } from './property/oracle-grid.ts';
import { cellsOfGap, gridOfCase, type TerrainCase, terrainCases } from './property/terrain-case.ts';

/** Pieces of void by their first cell: void touches at sides and corners, a gap between files only itself. */
function voidPieces(terrain: TerrainCase): number[][] {
  const gap = new Set(cellsOfGap(terrain.gap, terrain.width));
  const left = new Set([...terrain.z.keys()].filter((cell) => Number.isNaN(terrain.z[cell])));
  const pieces: number[][] = [];
  for (const first of left) {
    left.delete(first);
    const piece = [first];
    for (const cell of piece) {
      for (const other of around(terrain, cell, 8)) {
        if (gap.has(other) === gap.has(first) && left.delete(other)) piece.push(other);
      }
    }
    pieces.push(piece);
  }
  return pieces;
}

describe.each([1, 3, 256])('pieces of void joined from tiles of %i', (tileSize) => {
  it('are those of flooding them cell by cell, with the lowest cell of each catchment beside them', () => {
    check(1000, terrainCases({ width: 10, height: 9 }), (terrain) => {
      const { z, neighbours, madePits, gap, width } = terrain;
      const survey = surveyOf(gridOfCase(terrain), { neighbours, madePits, tileSize });
      const pieces = voidPieces(terrain);
      const inGap = new Set(cellsOfGap(gap, width));
      expect([...survey.voidCells]).toEqual(pieces.map((piece) => piece.length));
      expect([...survey.voidIsGap]).toEqual(pieces.map(([first]) => (inGap.has(first) ? 1 : 0)));
      const onRim = pieces.map((piece) => (piece.some((cell) => isOnRim(terrain, cell)) ? 1 : 0));
      expect([...survey.voidOnRim]).toEqual(onRim);
      const beside = new Map<string, number>();
      pieces.forEach((piece, p) => {
        z.forEach((value, cell) => {
          if (
            Number.isNaN(value) ||
            !around(terrain, cell, neighbours).some((other) => piece.includes(other))
          )
            return;
          const key = `${survey.leaf[cell]} ${p}`;
          const held = beside.get(key);
          if (held === undefined || value < z[held]) beside.set(key, cell);
        });
      });
      const found = [...survey.besideCell].map((cell, i): [string, number] => {
        expect(survey.besideElevationM[i]).toBe(z[cell] + 0);
        return [`${survey.besideLeaf[i]} ${survey.besidePiece[i]}`, cell];
      });
      expect(new Map(found)).toEqual(beside);
      expect(found.length).toBe(beside.size);
    });
  });
});
