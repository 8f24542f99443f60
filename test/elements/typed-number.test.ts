import { describe, expect, it } from 'vitest';
import { fieldNumber, typedNumber } from '../../src/elements/typed-number.ts';

// How the languages write numbers: Unicode CLDR, as Node carries it.
describe('typedNumber', () => {
  it.each([
    ['en', '1,000', 1000],
    ['en', '1,410.5', 1410.5],
    ['en', ' 0.1 ', 0.1],
    ['en', '.5', 0.5],
    ['en', '1234567', 1234567],
    ['de', '1.000', 1000],
    ['de', '0,1', 0.1],
    ['de', '1.410,5', 1410.5],
    ['fr', '1 000,5', 1000.5],
    ['de-CH', "1'000.5", 1000.5],
    ['en-IN', '1,00,000', 100_000],
    ['ar-EG', '١٫٥', 1.5],
  ])('reads in %s "%s" as %d', (tag, text, value) => {
    expect(typedNumber(text, tag)).toBe(value);
  });

  it.each([
    ['en', '1,5'],
    ['en', '0,125'],
    ['en', '1,00,000'],
    ['en', '1.000.000'],
    ['en', '1.000,5'],
    ['de', '0.1'],
    ['de', '1,000,000'],
    ['en', 'abc'],
    ['en', '-1'],
    ['en', '1 m'],
    ['en', ''],
    ['en', '.'],
  ])('refuses in %s "%s"', (tag, text) => {
    expect(typedNumber(text, tag)).toBe(null);
  });

  it.each(['en', 'de', 'fr', 'ar-EG'])('reads in %s what a field shows', (tag) => {
    for (const value of [0, 0.1, 1410.25, 123456])
      expect(typedNumber(fieldNumber(value, tag), tag)).toBe(value);
  });
});
