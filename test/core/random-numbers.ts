/**
 * Whole numbers from 0 up to below what is asked for, the same for the same seed (linear congruential generator,
 * constants of Numerical Recipes, 2nd ed., ch. 7.1; value from memory).
 */
export function randomNumbers(seed: number): (below: number) => number {
  let state = seed >>> 0;
  return (below) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 4294967296) * below);
  };
}
