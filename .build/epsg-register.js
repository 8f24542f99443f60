import { createRequire } from 'node:module';

/** Kinds of entries that terrains are located and measured by. */
const kinds = new Set(['CRS-PROJCRS', 'CRS-GEOGCRS', 'CRS-GEOG3DCRS', 'CRS-VERTCRS']);

/** One file of all codes in use, for pages: `overbrim-epsg.json`, an object code → entry. */
export const epsgRegister = {
  name: 'epsg-register',
  generateBundle() {
    const all = createRequire(import.meta.url)('epsg-index/all.json');
    const register = {};
    for (const { code, kind, name, wkt, proj4, unit } of Object.values(all)) {
      if (!kinds.has(kind)) continue;
      // The long form tells the datum and direction of heights; positions follow from the short one.
      register[code] = { code, kind, name, wkt: kind === 'CRS-VERTCRS' ? wkt : null, proj4, unit };
    }
    this.emitFile({ type: 'asset', fileName: 'overbrim-epsg.json', source: JSON.stringify(register) });
  },
};
