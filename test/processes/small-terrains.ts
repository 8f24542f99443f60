/**
 * Terrains drawn by hand, with cells of 10 m unless placed otherwise, whose answers can be worked out on paper: a
 * channel in the middle row between walls of 50 m, open to the east.
 */
const channel = (middle: readonly number[]): number[][] => [
  middle.map(() => 50),
  [...middle],
  middle.map(() => 50),
];

/** Pond A (pit 16 in column 2, spills at 19 in column 4) above pond B (pit 10 in column 6, spills at 13 in column 7). */
export const twoPonds = channel([50, 20, 16, 18, 19, 12, 10, 13, 11, 5]);

/** Pits of 10 (column 1) and 8 (column 3) that meet at 14 (column 2) and together spill at 20 (column 4). */
export const twinPits = channel([50, 10, 14, 8, 20, 3]);

/** A hill with a crater: no ground of the crater touches the edge. */
export const crater = [
  [1, 1, 1, 1, 1, 1, 1],
  [1, 5, 5, 5, 5, 5, 1],
  [1, 5, 9, 9, 9, 5, 1],
  [1, 5, 9, 3, 9, 5, 1],
  [1, 5, 9, 9, 9, 5, 1],
  [1, 5, 5, 5, 5, 5, 1],
  [1, 1, 1, 1, 1, 1, 1],
];

/** A plane that falls to the east: no water stands anywhere. */
export const plane = Array.from({ length: 5 }, () => Array.from({ length: 8 }, (_, column) => 20 - column));

/** A ring of 9 m around a floor of 4 m with a void in its middle. */
export const floorWithVoid = [
  [9, 9, 9, 9, 9],
  [9, 4, 4, 4, 9],
  [9, 4, Number.NaN, 4, 9],
  [9, 4, 4, 4, 9],
  [9, 9, 9, 9, 9],
];
