import fc from 'fast-check';
import { type CellRect, type Grid, gridOf, type Side } from '../../../src/core/grid.ts';
import { geographicMetrics, projectedMetrics, type RowMetrics } from '../../../src/core/metrics.ts';
import type { OutletRules } from '../../../src/core/outlets.ts';

/** A random grid with all that decides its ponds; plain values, so that a counterexample can be read. */
export interface TerrainCase {
  readonly width: number;
  readonly height: number;
  /** Row by row, NaN = void. */
  readonly z: readonly number[];
  readonly neighbours: 4 | 8;
  readonly wraps: boolean;
  readonly north: Side;
  readonly south: Side;
  readonly edges: 'open' | 'closed';
  readonly voids: 'rim' | 'walls' | 'all';
  /** A gap between two files of a mosaic, all void, and what it is taken for. */
  readonly gap: CellRect | null;
  readonly gaps: 'walls' | 'open';
  /** Level of the water beyond the rim and in voids that drain. */
  readonly edgeLevelM: number;
  readonly voidLevelM: number;
  /** Named outlets by cell, ascending. */
  readonly outlets: readonly { readonly cell: number; readonly levelM: number }[];
  readonly madePits: readonly number[];
  readonly metrics: 'square' | 'oblong' | 'geographic';
}

export interface CaseSize {
  readonly width: number;
  readonly height: number;
}

const none = Number.NaN;
const ground = Number.NEGATIVE_INFINITY;

/** How raw whole numbers become elevations. */
const reliefs: Record<string, (raw: number) => number> = {
  'all equal': () => 7,
  'two values': (raw) => raw % 2,
  'small integers': (raw) => raw % 5,
  'integers about zero': (raw) => (raw % 21) - 10,
  'fine values': (raw) => (raw / 1000) * 3 - 1500,
  'one-cell channels': (raw) => (raw % 3 === 0 ? (raw % 7) / 2 : 20),
  'flats with pits': (raw) => (raw % 4 === 0 ? 3 - (raw % 3) : 3),
  'huge and tiny': (raw) => [1e30, -1e30, 1e-30, -1e-30, 0, -0, 3e30, 5][raw % 8] * (1 + (raw % 13) / 16),
};

/** Random terrains up to a size; `plain` ones have no wrap, no poles and square cells, so that they can be turned. */
export function terrainCases(most: CaseSize, options: { plain?: boolean } = {}): fc.Arbitrary<TerrainCase> {
  const plain = options.plain ?? false;
  const upTo = (max: number): fc.Arbitrary<number> => fc.noBias(fc.integer({ min: 1, max }));
  const size = fc.oneof(
    { weight: 8, arbitrary: fc.tuple(upTo(most.width), upTo(most.height)) },
    { weight: 1, arbitrary: fc.tuple(upTo(most.width * 2), fc.constant(1)) },
    { weight: 1, arbitrary: fc.tuple(fc.constant(1), upTo(most.height * 2)) },
  );
  return size.chain(([width, height]) => {
    const cells = width * height;
    const raw = fc.array(fc.noBias(fc.integer({ min: 0, max: 999_999 })), {
      minLength: cells,
      maxLength: cells,
    });
    const someCells = (maxLength: number): fc.Arbitrary<number[]> =>
      fc
        .uniqueArray(fc.integer({ min: 0, max: cells - 1 }), { maxLength })
        .map((list) => list.sort((a, b) => a - b));
    return fc
      .record({
        raw,
        relief: fc.constantFrom(...Object.keys(reliefs)),
        voidShare: fc.constantFrom(0, 0, 8, 3),
        neighbours: fc.constantFrom(4 as const, 8 as const),
        wraps: fc.boolean(),
        sides: fc.constantFrom<readonly [Side, Side]>(
          ['beyond', 'beyond'],
          ['beyond', 'beyond'],
          ['pole', 'pole'],
          ['pole-row', 'pole-row'],
          ['pole-row', 'beyond'],
          ['beyond', 'pole-row'],
        ),
        edges: fc.constantFrom('open' as const, 'open' as const, 'closed' as const),
        voids: fc.constantFrom('rim' as const, 'walls' as const, 'all' as const),
        gap: fc.constantFrom(null, null, null, 'row' as const, 'column' as const),
        gaps: fc.constantFrom('walls' as const, 'open' as const),
        edgeLevelM: fc.constantFrom(ground, ground, ground, 1, 3.5),
        voidLevelM: fc.constantFrom(ground, ground, ground, 2, -3),
        named: someCells(3),
        levels: fc.array(fc.constantFrom(ground, ground, 2, 4, -3, 8.5), { minLength: 3, maxLength: 3 }),
        madePits: fc.oneof(fc.constant<number[]>([]), someCells(4)),
        metrics: fc.constantFrom('square' as const, 'oblong' as const, 'geographic' as const),
      })
      .map((draw): TerrainCase => {
        const relief = reliefs[draw.relief];
        const z = draw.raw.map((value) =>
          draw.voidShare > 0 && Math.floor(value / 1000) % draw.voidShare === 0
            ? none
            : Math.fround(relief(value)),
        );
        const gap = draw.gap === null ? null : gapOf(width, height, draw.gap, draw.raw[0]);
        for (const cell of cellsOfGap(gap, width)) z[cell] = none;
        const allVoid = z.every((value) => Number.isNaN(value));
        if (allVoid) z[0] = 1;
        // A single row cannot lie on both poles.
        const [north, south] = plain || height === 1 ? (['beyond', 'beyond'] as const) : draw.sides;
        return {
          width,
          height,
          z,
          neighbours: draw.neighbours,
          wraps: !plain && draw.wraps && width >= 3,
          north,
          south,
          edges: draw.edges,
          voids: draw.voids,
          gap: allVoid ? null : gap,
          gaps: draw.gaps,
          edgeLevelM: draw.edgeLevelM,
          voidLevelM: draw.voidLevelM,
          outlets: draw.named.map((cell, i) => ({ cell, levelM: draw.levels[i] })),
          madePits: draw.madePits.filter((cell) => !Number.isNaN(z[cell])),
          // Only degrees have poles.
          metrics: plain ? 'square' : `${north}${south}`.includes('pole') ? 'geographic' : draw.metrics,
        };
      });
  });
}

/** A gap of one to three cells across the grid, or part of the way. */
function gapOf(width: number, height: number, along: 'row' | 'column', draw: number): CellRect {
  const [length, depth] = along === 'row' ? [width, height] : [height, width];
  const across = Math.min(1 + (draw % 3), depth);
  const from = draw % (depth - across + 1);
  const reach = draw % 2 === 0 ? length : 1 + (draw % length);
  return along === 'row'
    ? { column: 0, row: from, width: reach, height: across }
    : { column: from, row: 0, width: across, height: reach };
}

/** Cells of a gap, row by row. */
export function cellsOfGap(gap: CellRect | null, width: number): number[] {
  if (gap === null) return [];
  return Array.from(
    { length: gap.width * gap.height },
    (_, i) => (gap.row + Math.floor(i / gap.width)) * width + gap.column + (i % gap.width),
  );
}

export function gridOfCase(terrain: TerrainCase): Grid {
  const { width, height, z, wraps, north, south, gap } = terrain;
  const frame = { wraps, north, south };
  const gaps = gap === null ? [] : [gap];
  return gridOf(width, height, Float32Array.from(z), metricsOfCase(terrain), frame, gaps);
}

export function metricsOfCase({ height, width, metrics, north, south }: TerrainCase): RowMetrics {
  if (metrics === 'square') return projectedMetrics(height, 1, 1);
  if (metrics === 'oblong') return projectedMetrics(height, 1.5, 0.7);
  // A row on a pole is centred there and so reaches half a cell beyond it.
  const onPoles = Number(north === 'pole-row') + Number(south === 'pole-row');
  const step = onPoles === 2 ? 180 / (height - 1) : 150 / Math.max(height, 2);
  const farthest = south === 'pole-row' ? -90 - step / 2 + height * step : 85;
  return geographicMetrics(height, north === 'pole-row' ? 90 + step / 2 : farthest, 360 / width, step);
}

export function rulesOfCase(terrain: TerrainCase): OutletRules {
  const { edges, voids, gaps, edgeLevelM, voidLevelM, outlets } = terrain;
  return {
    edges,
    voids,
    gaps,
    edgeLevelM,
    voidLevelM,
    cells: {
      cell: Float64Array.from(outlets, ({ cell }) => cell),
      levelM: Float32Array.from(outlets, ({ levelM }) => levelM),
    },
  };
}
