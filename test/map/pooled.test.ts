import { describe, expect, it } from 'vitest';
import { PooledShade } from '../../src/map/pooled-shade.ts';
import { PooledSurvey } from '../../src/map/pooled-survey.ts';
import { randomNumbers } from './made-view.ts';

describe('PooledSurvey', () => {
  it('is wet in a block exactly where any cell of it is, as deep as the deepest', () => {
    const random = randomNumbers(11);
    for (let round = 0; round < 2000; round++) {
      const width = 1 + Math.floor(random() * 9);
      const height = 1 + Math.floor(random() * 9);
      const elevationM = Float32Array.from({ length: width * height }, () => Math.floor(random() * 6));
      const leaf = Int32Array.from(elevationM, () => Math.floor(random() * 4) - 1);
      leaf.forEach((l, cell) => {
        if (l < 0) elevationM[cell] = Number.NaN;
      });
      const levelM = Float32Array.of(random() * 5, random() * 3, Number.POSITIVE_INFINITY);
      const depth = (ground: number, l: number) =>
        l < 0 || levelM[l] === Number.POSITIVE_INFINITY ? 0 : Math.max(0, levelM[l] - ground);
      const pooled = new PooledSurvey({ width, height, elevationM, leaf }, levelM);
      for (const halvings of [1, 2, 3]) {
        const side = 2 ** halvings;
        const block = pooled.at(halvings);
        expect([block.width, block.height]).toEqual([Math.ceil(width / side), Math.ceil(height / side)]);
        for (let b = 0; b < block.leaf.length; b++) {
          let deepest = 0;
          let land = 0;
          for (let cell = 0; cell < leaf.length; cell++) {
            const column = Math.floor((cell % width) / side);
            const row = Math.floor(Math.floor(cell / width) / side);
            if (row * block.width + column !== b) continue;
            deepest = Math.max(deepest, depth(elevationM[cell], leaf[cell]));
            if (leaf[cell] >= 0) land++;
          }
          expect(depth(block.groundM[b], block.leaf[b])).toBe(deepest);
          expect(block.leaf[b] < 0).toBe(land === 0);
        }
      }
    }
  });

  it('stands for the lowest ground where all is dry', () => {
    const cells = {
      width: 2,
      height: 2,
      elevationM: Float32Array.of(4, 3, 9, 7),
      leaf: Int32Array.of(0, 1, 1, 0),
    };
    expect(new PooledSurvey(cells, Float32Array.of(0, 0)).at(1).groundM).toEqual(Float32Array.of(3));
  });
});

describe('PooledShade', () => {
  it('is the mean of what is no void', () => {
    const shade = { width: 3, height: 2, value: Uint8Array.of(10, 20, 7, 0, 30, 0) };
    const pooled = new PooledShade(shade);
    expect(pooled.at(1)).toEqual({ width: 2, height: 1, value: Uint8Array.of(20, 7) });
    expect(pooled.at(2).value).toEqual(Uint8Array.of(14));
  });

  it('keeps voids void', () => {
    expect(new PooledShade({ width: 2, height: 2, value: new Uint8Array(4) }).at(1).value).toEqual(
      Uint8Array.of(0),
    );
  });
});
