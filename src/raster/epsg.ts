/** What the EPSG register says about one code, as far as it is used here. */
export interface EpsgEntry {
  readonly code: string;
  /** `CRS-PROJCRS`, `CRS-GEOGCRS`, `CRS-GEOG3DCRS`, `CRS-VERTCRS` and others. */
  readonly kind: string;
  readonly name: string;
  readonly wkt: string | null;
  readonly proj4: string | null;
  readonly unit: string | null;
}

/** Finds one entry of the register; null when there is no such code. */
export type EpsgLookup = (code: number) => Promise<EpsgEntry | null>;

/**
 * The lookup where modules are resolved by name: one small JSON file a code, loaded when it is asked for.
 * Pages that load no packages by name give a lookup of their own.
 */
export const packagedEpsg: EpsgLookup = async (code) => {
  try {
    const path = `epsg-index/s/${code}.json`;
    const module: { default: EpsgEntry } = await import(/* @vite-ignore */ path, { with: { type: 'json' } });
    return module.default;
  } catch (error) {
    // Only a missing file means that there is no such code; anything else is a fault to be seen.
    if (
      /cannot find|not found|failed to (fetch|load|resolve)|unknown variable dynamic import/i.test(
        String(error),
      )
    )
      return null;
    throw error;
  }
};
