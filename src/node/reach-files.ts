import type { Reach } from '../engine/index.ts';
import { urlSource } from '../raster/url-source.ts';
import { epsgFiles } from './epsg-files.ts';
import { fileSource } from './file-source.ts';

/** Files on disk by path, files on the web by URL. */
export const reachFiles: Reach = {
  source: async (reference) =>
    /^https?:\/\//i.test(reference) ? urlSource(reference) : fileSource(reference),
  epsg: epsgFiles,
};
