import { plan, railwayY, riverY } from './plan.ts';

/** Ground cover, in words that runoff tables use. */
export type Cover =
  | 'water'
  | 'woods'
  | 'meadow'
  | 'pasture'
  | 'row crops'
  | 'open space'
  | 'residential'
  | 'commercial'
  | 'gravel'
  | 'newly graded';

export interface CoverArea {
  readonly cover: Cover;
  readonly ring: readonly (readonly [number, number])[];
}

type Edge = (x: number) => number;

const level =
  (y: number): Edge =>
  () =>
    y;

/** Bands from north to south, each cut into columns: together they cover the whole town once. */
const bands: readonly {
  readonly top: Edge;
  readonly bottom: Edge;
  readonly columns: readonly (readonly [number, Cover])[];
}[] = [
  {
    top: level(0),
    bottom: level(110),
    columns: [
      [700, 'woods'],
      [2000, 'pasture'],
    ],
  },
  {
    top: level(110),
    bottom: level(340),
    columns: [
      [420, 'woods'],
      [800, 'meadow'],
      [1490, 'row crops'],
      [1750, 'newly graded'],
      [2000, 'pasture'],
    ],
  },
  {
    top: level(340),
    bottom: (x) => railwayY(x) - 8,
    columns: [
      [420, 'woods'],
      [800, 'meadow'],
      [1490, 'row crops'],
      [2000, 'pasture'],
    ],
  },
  { top: (x) => railwayY(x) - 8, bottom: (x) => railwayY(x) + 8, columns: [[2000, 'gravel']] },
  {
    top: (x) => railwayY(x) + 8,
    bottom: level(870),
    columns: [
      [110, 'meadow'],
      [560, 'residential'],
      [680, 'open space'],
      [1490, 'residential'],
      [2000, 'meadow'],
    ],
  },
  {
    top: level(870),
    bottom: level(1085),
    columns: [
      [110, 'meadow'],
      [560, 'residential'],
      [680, 'open space'],
      [1180, 'commercial'],
      [1490, 'residential'],
      [2000, 'open space'],
    ],
  },
  {
    top: level(1085),
    bottom: (x) => riverY(x) - 14,
    columns: [
      [800, 'meadow'],
      [1500, 'open space'],
      [2000, 'meadow'],
    ],
  },
  { top: (x) => riverY(x) - 14, bottom: (x) => riverY(x) + 14, columns: [[2000, 'water']] },
  {
    top: (x) => riverY(x) + 14,
    bottom: level(1690),
    columns: [
      [1200, 'meadow'],
      [2000, 'pasture'],
    ],
  },
  {
    top: level(1690),
    bottom: level(plan.size),
    columns: [
      [600, 'row crops'],
      [1100, 'pasture'],
      [1700, 'row crops'],
      [2000, 'woods'],
    ],
  },
];

export function landCover(): CoverArea[] {
  return bands.flatMap(({ top, bottom, columns }) =>
    columns.map(([east, cover], i) => {
      const xs = stations(i > 0 ? columns[i - 1][0] : 0, east);
      const north = xs.map((x): [number, number] => [x, top(x)]);
      const south = xs.map((x): [number, number] => [x, bottom(x)]);
      return { cover, ring: [...north, ...south.reverse()] };
    }),
  );
}

/** Every 10 m on one lattice, so that neighbours share their vertices. */
function stations(from: number, to: number): number[] {
  const xs: number[] = [];
  for (let x = from; x <= to; x += 10) xs.push(x);
  return xs;
}
