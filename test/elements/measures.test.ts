import { describe, expect, it } from 'vitest';
import { acreFootM3, acreM2, footM, Measures } from '../../src/elements/measures.ts';

const metric = new Measures('en', 'metric');
const us = new Measures('en', 'us');
/** Numbers and units are joined by a no-break space. */
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('units', () => {
  it('has the international foot, the acre of 43 560 square feet and the acre-foot (NIST Handbook 44, app. C)', () => {
    expect(footM).toBe(0.3048);
    expect(acreM2).toBeCloseTo(43_560 * 0.3048 ** 2, 9);
    expect(acreFootM3).toBeCloseTo(43_560 * 0.3048 ** 3, 9);
  });

  it('types least sizes in the units of the reader', () => {
    expect(metric.fieldUnits.capacity).toEqual({ symbol: 'm³', size: 1 });
    expect(us.fieldUnits.area.symbol).toBe('acre');
    expect(us.fieldUnits.area.size).toBe(acreM2);
  });
});

describe('figures', () => {
  it.each([
    [37.171875, '37.17 m', '121.95 ft'],
    [-0.001, '0.00 m', '0.00 ft'],
    [0, '0.00 m', '0.00 ft'],
  ])('writes the elevation %f to the centimetre', (m, inMetres, inFeet) => {
    expect(plain(metric.elevation(m))).toBe(inMetres);
    expect(plain(us.elevation(m))).toBe(inFeet);
  });

  it.each([
    [274_860, '275,000 m³', '223 acre-ft'],
    [9.876, '9.88 m³', '349 ft³'],
    [0, '0 m³', '0 ft³'],
  ])('writes the volume %f to three figures', (m3, inMetres, inFeet) => {
    expect(plain(metric.volume(m3))).toBe(inMetres);
    expect(plain(us.volume(m3))).toBe(inFeet);
  });

  it.each([
    [45.2, '45.2 m²', '487 ft²'],
    [45_144, '4.51 ha', '11.2 acre'],
    [25_000_000, '25 km²', '9.65 mi²'],
  ])('writes the area %f in the unit of its size', (m2, inMetres, inFeet) => {
    expect(plain(metric.area(m2))).toBe(inMetres);
    expect(plain(us.area(m2))).toBe(inFeet);
  });

  it.each([
    [263.4, '263 m', '864 ft'],
    [1843, '1.84 km', '1.15 mi'],
    [-1843, '-1.84 km', '-1.15 mi'],
  ])('writes the length %f', (m, inMetres, inFeet) => {
    expect(plain(metric.length(m))).toBe(inMetres);
    expect(plain(us.length(m))).toBe(inFeet);
  });

  it('writes numbers by the rules of the language', () => {
    expect(plain(new Measures('de', 'metric').volume(274_860))).toBe('275.000 m³');
    expect(plain(new Measures('de-CH', 'metric').elevation(37.171875))).toBe('37.17 m');
  });

  it('takes a language tag that is none for English', () => {
    expect(plain(new Measures('no such tag', 'metric').count(3377))).toBe('3,377');
  });

  it('tells times in seconds, then in minutes', () => {
    expect(metric.duration(3400)).toBe('3 s');
    expect(metric.duration(125_000)).toBe('2 min 5 s');
  });
});
