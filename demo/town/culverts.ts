import { railwayY, swales } from './plan.ts';
import { avenueName, blockV, toStreetFrame } from './streets.ts';

/** A culvert that the ground does not show: its line from inlet to outlet and the inverts of its ends. */
export interface Culvert {
  readonly name: string;
  readonly under: string;
  readonly diameterM: number;
  readonly line: readonly [readonly [number, number], readonly [number, number]];
  readonly inletInvertM: number;
  readonly outletInvertM: number;
}

/** The culverts of the railway and of the avenues that cross a watercourse. */
export function culverts(): Culvert[] {
  const found: Culvert[] = [];
  for (const [i, swale] of swales.entries()) {
    const y = railwayY(swale.x(600));
    found.push(through(`${swale.name} at the railway`, 'railway', 1.5, i, y - 22, y + 22));
  }
  for (const [i, avenue] of [
    [0, -1],
    [0, 1],
    [1, -1],
    [1, 0],
    [1, 2],
  ]) {
    const y = crossing(i, avenue);
    found.push(through(`${swales[i].name} at ${avenueName(avenue)}`, 'street', 0.9, i, y - 10, y + 10));
  }
  return found;
}

/** Where a watercourse meets an avenue: bisection on the avenue's own coordinate. */
function crossing(swale: number, avenue: number): number {
  let north = 500;
  let south = 1200;
  for (let n = 0; n < 50; n++) {
    const y = (north + south) / 2;
    if (toStreetFrame(swales[swale].x(y), y)[1] < avenue * blockV) north = y;
    else south = y;
  }
  return Math.round(north);
}

function through(
  name: string,
  under: string,
  diameterM: number,
  i: number,
  from: number,
  to: number,
): Culvert {
  const swale = swales[i];
  return {
    name,
    under,
    diameterM,
    line: [
      [swale.x(from), from],
      [swale.x(to), to],
    ],
    inletInvertM: rounded(swale.bed(from)),
    outletInvertM: rounded(swale.bed(to)),
  };
}

function rounded(metres: number): number {
  return Math.round(metres * 100) / 100;
}
