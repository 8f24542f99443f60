import type { FeatureCollection, Point } from 'geojson';

/** A pond as the process `depressions` describes it, with its place in the list. */
export interface Pond {
  readonly id: string;
  /** 1 = the one that holds most. */
  readonly number: number;
  readonly spillElevationM: number;
  readonly pitElevationM: number;
  readonly depthM: number;
  readonly areaM2: number;
  readonly capacityM3: number;
  readonly catchmentAreaM2: number;
  readonly contributingAreaM2: number;
  /** Id of the next pond, null at an outlet. */
  readonly spillsInto: string | null;
  readonly touchesEdge: boolean;
  readonly heldByOutlet: boolean;
  /** Longitude and latitude of its pour point. */
  readonly pourPoint: readonly [number, number] | null;
}

/** What the process `depressions` found. */
export interface FoundPonds {
  readonly outlines: FeatureCollection;
  readonly pourPoints: FeatureCollection;
  /** Largest capacity first. */
  readonly list: readonly Pond[];
  readonly byId: ReadonlyMap<string, Pond>;
  readonly capacityM3: number;
  readonly areaM2: number;
  /** Outermost ponds before any filter. */
  readonly all: number;
}

type Properties = Omit<Pond, 'number' | 'pourPoint'>;

/** Reads the outputs `ponds`, `pour-points` and `summary`. */
export function foundPonds(
  outlines: FeatureCollection,
  pourPoints: FeatureCollection,
  summary: { readonly outermostPonds: number },
): FoundPonds {
  const sills = new Map<string, readonly [number, number]>();
  for (const { geometry, properties } of pourPoints.features) {
    const [longitude, latitude] = (geometry as Point).coordinates;
    sills.set(String(properties?.pond), [longitude, latitude]);
  }
  const list = outlines.features
    .map(({ properties }) => properties as Properties)
    // Equal ponds keep the order of their ids, so that numbers do not depend on the order of writing.
    .sort((one, other) => other.capacityM3 - one.capacityM3 || (one.id < other.id ? -1 : 1))
    .map((pond, i): Pond => ({ ...pond, number: i + 1, pourPoint: sills.get(pond.id) ?? null }));
  return {
    outlines,
    pourPoints,
    list,
    byId: new Map(list.map((pond) => [pond.id, pond])),
    capacityM3: list.reduce((sum, pond) => sum + pond.capacityM3, 0),
    areaM2: list.reduce((sum, pond) => sum + pond.areaM2, 0),
    all: summary.outermostPonds,
  };
}
