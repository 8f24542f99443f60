/**
 * Sums that do not depend on the order of their terms. Each term is cut at fixed places into two slices whose
 * sums are exact in float64 for up to 2³¹ terms, so adding them in any order gives the same bits.
 * Pre-rounding as in Demmel & Nguyen, Parallel Reproducible Summation, 2015; with the bound known beforehand.
 *
 * The result is exact when no term needs bits below 2⁻⁴³ of the power of two at or above the bound, else within
 * 2⁻⁴⁴ of that power a term.
 */
const sliceBits = 22;
const termBits = 31;

/** The constant that cuts terms of at most `bound` (≥ 0): add and take away again to round to the first slice. */
export function sliceConstant(bound: number): number {
  if (!(bound > 0)) return 0;
  return 1.5 * powerAtLeast(bound) * 2 ** termBits;
}

/** What the constant of the second slice is, as a factor of the first. */
export const secondSlice = 2 ** -sliceBits;

/** First slice of a term. */
export function highSlice(term: number, constant: number): number {
  return term + constant - constant;
}

/** Second slice of a term, given its first. */
export function lowSlice(term: number, high: number, constant: number): number {
  const second = constant * secondSlice;
  return term - high + second - second;
}

/** The least power of two that is at least `value` (> 0), without a logarithm. */
function powerAtLeast(value: number): number {
  let power = 2 ** Math.ceil(Math.log2(value));
  while (power < value) power *= 2;
  while (power / 2 >= value) power /= 2;
  return power;
}
