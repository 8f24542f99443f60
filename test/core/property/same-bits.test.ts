import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { tilesOf } from '../../../src/core/tile-window.ts';
import { type Analysis, analysisOf } from './analysis.ts';
import { check } from './check.ts';
import { type TerrainCase, terrainCases } from './terrain-case.ts';

const sizes = [1, 3, 8, 64, 512];

/** All arrays of an analysis as one list of bytes each, by name. */
function bitsOf({ survey, drainage, depressions, measures, levelM }: Analysis): Record<string, string> {
  const bits: Record<string, string> = { survey: hex(new Uint8Array(survey.buffer)), levelM: hex(levelM) };
  const parts = { tree: drainage.tree, drainage, depressions, measures };
  for (const [part, arrays] of Object.entries(parts)) {
    for (const [name, values] of Object.entries(arrays)) {
      if (ArrayBuffer.isView(values)) bits[`${part}.${name}`] = hex(values);
    }
  }
  return bits;
}

function hex({ buffer, byteOffset, byteLength }: ArrayBufferView): string {
  return Buffer.from(buffer, byteOffset, byteLength).toString('hex');
}

/** Tile numbers in an order drawn from a seed (Fisher & Yates). */
function shuffled(count: number, seed: number): number[] {
  const order = Array.from({ length: count }, (_, i) => i);
  let state = seed >>> 0;
  for (let i = count - 1; i > 0; i--) {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    const k = Math.floor((state / 4294967296) * (i + 1));
    [order[i], order[k]] = [order[k], order[i]];
  }
  return order;
}

function expectSameBits(terrain: TerrainCase, order: number): void {
  const whole = bitsOf(analysisOf(terrain, { tileSize: 512 }));
  for (const tileSize of sizes) {
    const tiles = tilesOf(terrain.width, terrain.height, tileSize).length;
    expect(bitsOf(analysisOf(terrain, { tileSize })), `tiles of ${tileSize}`).toEqual(whole);
    const tileOrder = shuffled(tiles, order);
    expect(bitsOf(analysisOf(terrain, { tileSize, tileOrder })), `shuffled tiles of ${tileSize}`).toEqual(
      whole,
    );
  }
}

const order = fc.integer({ min: 0, max: 2 ** 31 });

describe('the same bits, volumes included, for any tile size and order of tiles', () => {
  it('on small grids', () => {
    check(2000, fc.tuple(terrainCases({ width: 12, height: 11 }), order), ([terrain, seed]) => {
      expectSameBits(terrain, seed);
    });
  });

  it('on grids of several tiles of 64', () => {
    check(25, fc.tuple(terrainCases({ width: 150, height: 140 }), order), ([terrain, seed]) => {
      expectSameBits(terrain, seed);
    });
  });
});
