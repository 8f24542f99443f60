import type { FeatureCollection } from 'geojson';

/** A leg as the process `spill-path` describes it. */
export interface Leg {
  readonly leg: number;
  readonly kind: 'land' | 'pond' | 'culvert';
  readonly pond: string | null;
  readonly lengthM: number;
  readonly dropM: number;
  readonly fromElevationM: number;
  readonly toElevationM: number;
  readonly storageM3: number;
  readonly endsAt: 'outlet' | 'no-way' | null;
}

/** What the process `spill-path` traced. */
export interface TracedPath {
  /** The start as it was asked, x,y. */
  readonly from: string;
  readonly lines: FeatureCollection;
  readonly legs: readonly Leg[];
  readonly lengthM: number;
  readonly dropM: number;
  readonly storageM3: number;
  readonly endsAt: 'outlet' | 'no-way';
}

/** Reads the output `spill-path`. */
export function tracedPath(from: string, lines: FeatureCollection): TracedPath {
  const legs = lines.features.map(({ properties }) => properties as Leg);
  const sum = (of: (leg: Leg) => number): number => legs.reduce((total, leg) => total + of(leg), 0);
  return {
    from,
    lines,
    legs,
    lengthM: sum((leg) => leg.lengthM),
    dropM: legs.length === 0 ? 0 : legs[0].fromElevationM - legs[legs.length - 1].toElevationM,
    storageM3: sum((leg) => leg.storageM3),
    endsAt: legs[legs.length - 1]?.endsAt ?? 'no-way',
  };
}
