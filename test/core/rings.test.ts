import { describe, expect, it } from 'vitest';
import {
  directionSteps,
  directions,
  type Polygon,
  polygonsOf,
  reversed,
  sideStarts,
} from '../../src/core/rings.ts';
import { randomNumbers } from './random-numbers.ts';
import { cellsInside, isConnected, ringArea, unitSteps } from './ring-checks.ts';

/** Boundary edges of the cells marked `#`. */
function edgesOf(text: string): { edges: number[]; width: number; height: number; cells: number[] } {
  const rows = text.trim().split(/\s+/);
  const width = rows[0].length;
  const cells = [...rows.join('')].flatMap((mark, cell) => (mark === '#' ? [cell] : []));
  const wet = new Set(cells);
  const starts = sideStarts(width);
  const edges: number[] = [];
  for (const cell of cells) {
    const column = cell % width;
    const vertex = Math.floor(cell / width) * (width + 1) + column;
    const beside = [
      cell + width,
      column < width - 1 ? cell + 1 : -1,
      cell - width,
      column > 0 ? cell - 1 : -1,
    ];
    beside.forEach((other, direction) => {
      if (!wet.has(other)) edges.push((vertex + starts[direction]) * directions + direction);
    });
  }
  return { edges, width, height: rows.length, cells };
}

function polygons(text: string): Polygon[] {
  const { edges, width } = edgesOf(text);
  return polygonsOf(edges, width);
}

/** Areas of the outer ring and of the holes of each polygon, in cells. */
function areas(text: string): number[][] {
  const { width } = edgesOf(text);
  return polygons(text).map(({ outer, holes }) => [outer, ...holes].map((ring) => ringArea(ring, width)));
}

describe('edges', () => {
  it('run counter-clockwise around a cell, and each has another side', () => {
    const steps = directionSteps(3);
    const starts = sideStarts(3);
    for (let d = 0; d < 4; d++) expect(starts[d] + steps[d]).toBe(starts[(d + 1) % 4]);
    for (let edge = 20; edge < 40; edge++) {
      expect(reversed(reversed(edge, steps), steps)).toBe(edge);
      expect(reversed(edge, steps) % directions).toBe((edge + 2) % directions);
    }
  });
});

describe('polygons along cell edges', () => {
  it('of one cell: its four corners, counter-clockwise from a north-up view, closed', () => {
    const [{ outer, holes }] = polygons('#');
    expect(holes).toEqual([]);
    // Corners: 0 north-west, 1 north-east, 2 south-west, 3 south-east.
    expect([...outer].slice(1).sort()).toEqual([0, 1, 2, 3]);
    expect(outer[0]).toBe(outer[4]);
    expect(ringArea(outer, 1)).toBe(1);
  });

  it('of nothing: none', () => {
    expect(polygonsOf([], 5)).toEqual([]);
  });

  it('of a block with a hole', () => {
    expect(areas('### #.# ###')).toEqual([[9, -1]]);
  });

  it('of two cells that touch at a corner: two polygons', () => {
    expect(areas('#. .#')).toEqual([[1], [1]]);
    expect(areas('.# #.')).toEqual([[1], [1]]);
  });

  it('with a hole that touches the outer ring at a corner', () => {
    expect(areas('##. #.# ###')).toEqual([[8, -1]]);
    expect(areas('.## #.# ###')).toEqual([[8, -1]]);
    expect(areas('### #.# .##')).toEqual([[8, -1]]);
  });

  it('with two holes that touch at a corner: two holes', () => {
    expect(areas('#### #.## ##.# ####')).toEqual([[16, -1, -1]]);
    expect(areas('#### ##.# #.## ####')).toEqual([[16, -1, -1]]);
  });

  it('with an island in a hole, and a hole in that', () => {
    expect(areas('####### #.....# #.###.# #.#.#.# #.###.# #.....# #######')).toEqual([
      [49, -25],
      [9, -1],
    ]);
  });

  it('with an island that touches its hole at corners on all sides', () => {
    expect(areas('##### ##.## #.#.# ##.## #####')).toEqual([[25, -5], [1]]);
  });

  it('with a wall of two cells that touch at a corner, where a ring would meet itself', () => {
    const text = '##### #.### ##.## ###.# #####';
    expect(areas(text)).toEqual([[25, -1, -1, -1]]);
  });

  it('keep a vertex at least every sixteenth cell, so that a projected side can bend', () => {
    const [{ outer }] = polygons('#'.repeat(40));
    const sides = outer.slice(1).map((vertex, i) => Math.abs((vertex % 41) - (outer[i] % 41)));
    expect(Math.max(...sides)).toBe(16);
    expect(outer.length - 1).toBe(8);
    expect(polygons('#'.repeat(15))[0].outer.length - 1).toBe(4);
  });

  it('depend on the edges alone, not on their order', () => {
    const { edges, width } = edgesOf('##.## #.#.# ##.## ..#.. #####');
    const expected = polygonsOf(edges, width);
    const next = randomNumbers(41);
    for (let round = 0; round < 20; round++) {
      const other = [...edges].sort(() => next(3) - 1);
      expect(polygonsOf(other, width)).toEqual(expected);
    }
  });

  it('hold the cells and no others, touch themselves nowhere and hang together, on every seventh grid of 4 × 4', () => {
    for (let mask = 1; mask < 65536; mask += 7) {
      const marks = Array.from({ length: 16 }, (_, i) => ((mask >> i) & 1 ? '#' : '.')).join('');
      const text = [0, 4, 8, 12].map((at) => marks.slice(at, at + 4)).join(' ');
      const { width, height, cells } = edgesOf(text);
      const found = polygons(text).flatMap(({ outer, holes }) => {
        expect(ringArea(outer, width)).toBeGreaterThan(0);
        for (const hole of holes) expect(ringArea(hole, width)).toBeLessThan(0);
        for (const ring of [outer, ...holes]) {
          const passed = unitSteps(ring, width);
          expect(new Set(passed).size, text).toBe(passed.length);
        }
        const inside = cellsInside([outer, ...holes], width, height);
        expect(isConnected(inside, width), text).toBe(true);
        return inside;
      });
      expect(
        found.sort((a, b) => a - b),
        text,
      ).toEqual(cells);
    }
  });
});
