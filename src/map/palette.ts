import type { Rgb } from './packed-colour.ts';

/** Water from `fromM` (metres, inclusive) up to the next class. */
export interface DepthClass {
  readonly fromM: number;
  readonly colour: Rgb;
  readonly label: string;
}

export interface Palette {
  /** Relief where no light falls, and where it falls straight on. */
  readonly shadow: Rgb;
  readonly lit: Rgb;
  /** Path, pour points and what is selected. */
  readonly accent: Rgb;
  /** Around the accent, so that it stands off from land and water. */
  readonly halo: Rgb;
  readonly shore: Rgb;
}

/**
 * Five depths in the perceptually even blue of Kovesi (Good Colour Maps: How to Design Them, arXiv:1509.03700,
 * 2015; map CET-L12, linear_blue_95-50_c20), at 0.20, 0.40, 0.60, 0.80 and 1.00 of its length. Limits are common
 * practice, no source.
 */
export const depthClasses: readonly DepthClass[] = [
  { fromM: 0, colour: [0xc9, 0xd8, 0xec], label: 'shallow, under 0.15 m' },
  { fromM: 0.15, colour: [0xa3, 0xc0, 0xe4], label: '0.15 to 0.5 m' },
  { fromM: 0.5, colour: [0x84, 0xa8, 0xd1], label: '0.5 to 1 m' },
  { fromM: 1, colour: [0x67, 0x91, 0xbd], label: '1 to 2 m' },
  { fromM: 2, colour: [0x3a, 0x7b, 0xb1], label: '2 m and more' },
];

/** Paper and red ink. */
export const lightPalette: Palette = {
  shadow: [96, 96, 94],
  lit: [252, 251, 248],
  accent: [190, 48, 24],
  halo: [255, 255, 255],
  shore: [38, 84, 130],
};

/** The same drawing on a dark page. */
export const darkPalette: Palette = {
  shadow: [18, 19, 20],
  lit: [112, 113, 115],
  accent: [255, 138, 96],
  halo: [24, 25, 27],
  shore: [214, 228, 242],
};
