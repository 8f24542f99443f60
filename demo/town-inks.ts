/** Colours of the town's drawing. */
export interface Inks {
  readonly ground: string;
  /** By land cover. */
  readonly cover: Readonly<Record<string, string>>;
  readonly street: string;
  readonly kerb: string;
  readonly building: string;
  readonly wall: string;
  readonly name: string;
  readonly halo: string;
}

/** Pencil greys on paper; the relief is laid over them. */
export const dayInks: Inks = {
  ground: '#f4f2ec',
  cover: {
    woods: '#d9dad2',
    meadow: '#eeede6',
    pasture: '#f0efe8',
    'row crops': '#f1eee4',
    residential: '#efedea',
    'open space': '#e6e7e0',
    commercial: '#e7e4e1',
    gravel: '#e3dfd8',
    'newly graded': '#ebe5da',
    water: '#ccd5dc',
  },
  street: '#ffffff',
  kerb: '#bdb9b1',
  building: '#b4b1ab',
  wall: '#86837d',
  name: '#3c4144',
  halo: 'rgba(251, 250, 246, 0.9)',
};

/** The same drawing in chalk on slate. */
export const nightInks: Inks = {
  ground: '#6a6c6e',
  cover: {
    woods: '#565a58',
    meadow: '#666967',
    pasture: '#686b69',
    'row crops': '#6b6a66',
    residential: '#66676a',
    'open space': '#5f6361',
    commercial: '#606164',
    gravel: '#6a6763',
    'newly graded': '#6f6a62',
    water: '#46525c',
  },
  street: '#a9abae',
  kerb: '#45474a',
  building: '#2b2d30',
  wall: '#8d8f92',
  name: '#f0eeea',
  halo: 'rgba(24, 27, 29, 0.85)',
};
