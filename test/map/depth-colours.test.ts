import { describe, expect, it } from 'vitest';
import { depthColours, paintDepths } from '../../src/map/depth-colours.ts';
import { packed } from '../../src/map/packed-colour.ts';
import { darkPalette, lightPalette, type Palette } from '../../src/map/palette.ts';

const classes = [
  { fromM: 1, colour: [3, 2, 1], label: 'deep' },
  { fromM: 0, colour: [9, 8, 7], label: 'shallow' },
] as const;

describe('paintDepths', () => {
  it('paints strictly below the level, by the class that holds the depth', () => {
    const out = new Uint32Array(7);
    const groundM = Float32Array.of(5, 4.999, 4, 3, 0, 9, 1);
    const leaf = Int32Array.of(0, 0, 0, 0, -1, 0, 1);
    paintDepths(groundM, leaf, Float32Array.of(5, Number.POSITIVE_INFINITY), depthColours(classes), out);
    const [shallow, deep] = [packed([9, 8, 7]), packed([3, 2, 1])];
    expect([...out]).toEqual([0, shallow, deep, deep, 0, 0, 0]);
  });

  it('packs colours as a canvas holds them: red, green, blue, opaque', () => {
    expect([...new Uint8Array(Uint32Array.of(packed([1, 2, 3])).buffer)]).toEqual([1, 2, 3, 255]);
  });
});

/** CIE 1976 lightness of an sRGB colour (IEC 61966-2-1; CIE 15). */
function lightness(colour: readonly number[]): number {
  const linear = colour
    .map((part) => part / 255)
    .map((c) => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4));
  const y = 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2];
  return y > (6 / 29) ** 3 ? 116 * Math.cbrt(y) - 16 : (y * 24389) / 27;
}

describe.each([
  ['light', lightPalette, -1],
  ['dark', darkPalette, 1],
] as [string, Palette, number][])('the %s palette', (_, palette, deeper) => {
  it('has depths of even steps in lightness, each with a label of its own', () => {
    const steps = palette.depths
      .slice(1)
      .map(({ colour }, at) => deeper * (lightness(colour) - lightness(palette.depths[at].colour)));
    for (const step of steps) {
      expect(step).toBeGreaterThan(7);
      expect(step).toBeLessThan(11);
    }
    expect(new Set(palette.depths.map(({ label }) => label)).size).toBe(palette.depths.length);
  });

  // WCAG 2.2, 1.4.11: graphical objects need 3 : 1 against what lies beside them; the accent has its halo.
  it('sets the accent off from its halo and from level ground', () => {
    const luminance = (colour: readonly number[]): number => ((lightness(colour) + 16) / 116) ** 3;
    const contrast = (one: readonly number[], other: readonly number[]): number => {
      const [dark, bright] = [luminance(one), luminance(other)].sort((a, b) => a - b);
      return (bright + 0.05) / (dark + 0.05);
    };
    expect(contrast(palette.accent, palette.halo)).toBeGreaterThan(3);
    expect(contrast(palette.accent, palette.level)).toBeGreaterThan(3);
    expect(contrast(palette.shore, palette.level)).toBeGreaterThan(1.7);
  });
});
