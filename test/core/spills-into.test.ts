import { describe, expect, it } from 'vitest';
import { noPond, spillsInto } from '../../src/core/spills-into.ts';
import { analysisOf, pondsOf } from './property/analysis.ts';
import type { TerrainCase } from './property/terrain-case.ts';
import { terrainFromText } from './terrain-from-text.ts';

/** For each kept pond (named by its pit cell and spill elevation) the one it spills into. */
function into(text: string, keeps: (capacityM3: number) => boolean = () => true): Record<string, string> {
  const terrain: TerrainCase = terrainFromText(text, { edges: 'closed' });
  const found = analysisOf({
    ...terrain,
    outlets: [{ cell: terrain.width - 1, levelM: Number.NEGATIVE_INFINITY }],
  });
  const ponds = pondsOf(found).filter(({ capacityM3 }) => keeps(capacityM3));
  const kept = new Uint8Array(found.depressions.parent.length);
  for (const { node } of ponds) kept[node] = 1;
  const { depressions, survey } = found;
  const name = (node: number): string =>
    node === noPond
      ? 'none'
      : `${survey.pitCell[depressions.pitLeaf[node]]} at ${depressions.spillElevationM[node]}`;
  const next = spillsInto(survey, found.drainage, depressions, kept);
  return Object.fromEntries(ponds.map(({ node }) => [name(node), name(next[node])]));
}

describe('a pond spills into', () => {
  it('the next one downstream, the last into none', () => {
    expect(into('9 1 5 2 4 0')).toEqual({ '1 at 5': '3 at 4', '3 at 4': 'none' });
  });

  it('the next kept one, past those that are not', () => {
    const text = '9 1 8 6 7 2 5 0';
    expect(into(text)).toEqual({ '1 at 8': '3 at 7', '3 at 7': '5 at 5', '5 at 5': 'none' });
    expect(into(text, (capacity) => capacity > 1)).toEqual({ '1 at 8': '5 at 5', '5 at 5': 'none' });
  });

  it('the next one past flats on the way', () => {
    expect(into('9 1 6 6 5 5 5 3 5 5 0')).toEqual({ '1 at 6': '7 at 5', '7 at 5': 'none' });
  });

  it('its neighbour where both lie in one larger pond, which itself goes on', () => {
    expect(into('9 1 4 2 7 3 5 0')).toEqual({
      '1 at 4': '3 at 4',
      '3 at 4': '1 at 4',
      '1 at 7': '5 at 5',
      '5 at 5': 'none',
    });
  });

  it('what its parent spills into where its neighbour is not kept', () => {
    const text = '9 1 4 3.5 7 3 5 0';
    expect(into(text, (capacity) => capacity > 1)).toEqual({
      '1 at 4': '5 at 5',
      '1 at 7': '5 at 5',
      '5 at 5': 'none',
    });
  });

  it('its neighbour across a flat at the elevation where they meet', () => {
    expect(into('9 1 4 4 4 2 7 0')).toEqual({ '1 at 4': '5 at 4', '5 at 4': '1 at 4', '1 at 7': 'none' });
  });
});
