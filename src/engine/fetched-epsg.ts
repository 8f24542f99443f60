import type { EpsgEntry, EpsgLookup } from '../raster/epsg.ts';

/** A lookup in one JSON file of all codes, fetched when the first code is asked for. */
export function fetchedEpsg(url: string): EpsgLookup {
  let register: Promise<Record<string, EpsgEntry>> | undefined;
  return async (code) => {
    register ??= fetch(url).then((response) => {
      if (!response.ok) throw new Error(`${url} answered ${response.status}`);
      return response.json();
    });
    return (await register)[code] ?? null;
  };
}
