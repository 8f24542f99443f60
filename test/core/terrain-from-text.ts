import { gridFromText } from './oracles/sample-grids.ts';
import type { TerrainCase } from './property/terrain-case.ts';

/** A terrain from rows of text (see gridFromText): open edges, 8 neighbours, square cells of 1 m unless told. */
export function terrainFromText(text: string, given: Partial<TerrainCase> = {}): TerrainCase {
  const { width, height, z } = gridFromText(text);
  return {
    width,
    height,
    z: [...z],
    neighbours: 8,
    wraps: false,
    north: 'beyond',
    south: 'beyond',
    edges: 'open',
    voids: 'rim',
    gap: null,
    gaps: 'walls',
    edgeLevelM: Number.NEGATIVE_INFINITY,
    voidLevelM: Number.NEGATIVE_INFINITY,
    outlets: [],
    madePits: [],
    metrics: 'square',
    ...given,
  };
}
