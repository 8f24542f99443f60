import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { EpsgEntry, EpsgLookup } from '../raster/epsg.ts';

const require = createRequire(import.meta.url);

/** The lookup for Node: reads the code's file itself, since Node 20 warns when JSON is imported as a module. */
export const epsgFiles: EpsgLookup = async (code) => {
  try {
    const path = require.resolve(`epsg-index/s/${code}.json`);
    return JSON.parse(await readFile(path, 'utf8')) as EpsgEntry;
  } catch {
    return null;
  }
};
