import type { Rgb } from './packed-colour.ts';

/** Water from `fromM` (metres, inclusive) up to the next class. */
export interface DepthClass {
  readonly fromM: number;
  readonly colour: Rgb;
  readonly label: string;
}

export interface Palette {
  /** Relief where no light falls, on level ground, and where light falls straight on. */
  readonly shadow: Rgb;
  readonly level: Rgb;
  readonly lit: Rgb;
  /** How relief lies on the drawing beneath it: it shades that in place of covering it. */
  readonly blend: 'multiply' | 'hard-light';
  /** Path, pour points and what is selected. */
  readonly accent: Rgb;
  /** Around the accent, so that it stands off from land and water. */
  readonly halo: Rgb;
  readonly shore: Rgb;
  /** Depth classes; the deepest stands out most. */
  readonly depths: readonly DepthClass[];
}

/** Kovesi's blue at 0.20, 0.40, 0.60, 0.80 and 1.00 of its length. */
const blues: readonly Rgb[] = [
  [0xc9, 0xd8, 0xec],
  [0xa3, 0xc0, 0xe4],
  [0x84, 0xa8, 0xd1],
  [0x67, 0x91, 0xbd],
  [0x3a, 0x7b, 0xb1],
];

/**
 * Five depths in a perceptually even blue (Kovesi, Good Colour Maps: How to Design Them, arXiv:1509.03700, 2015; map
 * CET-L12, linear_blue_95-50_c20), first colour shallowest. Limits are common practice, no source.
 */
function depthsIn(colours: readonly Rgb[]): DepthClass[] {
  const limits: [number, string][] = [
    [0, 'shallow, under 0.15 m'],
    [0.15, '0.15 to 0.5 m'],
    [0.5, '0.5 to 1 m'],
    [1, '1 to 2 m'],
    [2, '2 m and more'],
  ];
  return limits.map(([fromM, label], place) => ({ fromM, label, colour: colours[place] }));
}

/** Paper and red ink. */
export const lightPalette: Palette = {
  shadow: [104, 103, 100],
  level: [229, 227, 221],
  lit: [255, 255, 253],
  blend: 'multiply',
  accent: [190, 48, 24],
  halo: [255, 255, 255],
  shore: [38, 84, 130],
  depths: depthsIn(blues),
};

/** The same drawing on a dark page, where light stands out and so is deep. */
export const darkPalette: Palette = {
  shadow: [16, 17, 18],
  level: [58, 60, 62],
  lit: [128, 129, 131],
  blend: 'hard-light',
  accent: [255, 138, 96],
  halo: [24, 25, 27],
  shore: [92, 142, 190],
  depths: depthsIn([...blues].reverse()),
};
