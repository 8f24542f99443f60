import proj4 from 'proj4';
import { OverbrimError } from '../core/error.ts';
import { type EpsgEntry, type EpsgLookup, packagedEpsg } from './epsg.ts';
import { type GeoKeys, keys, numberKey, textKey, userDefined } from './geo-keys.ts';
import type { Crs } from './terrain.ts';
import { userDefinedProj4 } from './user-defined-crs.ts';

/**
 * A horizontal CRS by its EPSG code.
 * @throws OverbrimError `unsupported` when the register has no such projected or geographic CRS, or its axes or
 * units are not ones that a terrain can be measured in.
 */
export async function crsFromEpsg(code: number, lookup: EpsgLookup = packagedEpsg): Promise<Crs> {
  const entry = await lookup(code);
  if (!entry) throw unknown(`EPSG:${code} is not in the register of coordinate reference systems`);
  const definition = definitionOf(entry);
  if (definition === null) {
    throw unknown(`EPSG:${code} (${entry.name}) is no projected or geographic CRS with a known definition`);
  }
  return crsOf(entry.name, code, definition);
}

/**
 * The horizontal CRS that a file's keys name or define (OGC GeoTIFF 1.1, clause 7).
 * @throws OverbrimError `unsupported` when they tell none that is known.
 */
export async function crsFromKeys(geoKeys: GeoKeys, name: string, lookup?: EpsgLookup): Promise<Crs> {
  const model = numberKey(geoKeys, keys.modelType);
  if (model !== 1 && model !== 2) {
    throw unknown(`${name} has a CRS of kind ${model ?? 'none'} (key 1024)`);
  }
  const code = numberKey(geoKeys, model === 1 ? keys.projectedCrs : keys.geodeticCrs);
  if (code !== null && code !== userDefined && code !== 0) {
    if (code === 3857) {
      throw new OverbrimError(
        'unsupported',
        `The CRS of ${name} is EPSG:3857, in which areas are inflated (fourfold at 60° latitude); expected one to measure in, so warp the terrain to a local projected CRS or to EPSG:4326.`,
      );
    }
    const crs = await crsFromEpsg(code, lookup);
    if (crs.kind !== (model === 1 ? 'projected' : 'geographic')) {
      throw unknown(
        `${name} calls EPSG:${code} (${crs.name}) a ${model === 1 ? 'projected' : 'geographic'} CRS`,
      );
    }
    return sameUnit(crs, geoKeys, name);
  }
  const citation =
    textKey(geoKeys, model === 1 ? keys.projectedCitation : keys.geodeticCitation) ??
    textKey(geoKeys, keys.citation) ??
    'user-defined';
  const definition = await userDefinedProj4(geoKeys, model === 1);
  if (definition === null) {
    throw unknown(`The keys of ${name} define a CRS ("${citation}") that cannot be made out`);
  }
  const title = textKey(geoKeys, keys.citation);
  return crsOf(model === 1 && title !== null ? title : citation, null, definition);
}

/** Whether the published datum shift by a grid file had to be left out (positions may then be off by metres or more). */
export async function datumShiftLeftOut(crs: Crs, lookup: EpsgLookup = packagedEpsg): Promise<boolean> {
  const entry = crs.epsg === null ? null : await lookup(crs.epsg);
  return entry !== null && gridShift.test(entry.proj4 ?? '');
}

const gridShift = /\s*\+nadgrids=(?!@null)("[^"]*"|\S+)/;

/** Published seven-parameter shifts in place of grid files that are not at hand (EPSG:1314 and EPSG:1777). */
const insteadOfGrid: readonly (readonly [RegExp, string])[] = [
  [/OSTN15/, ' +towgs84=446.448,-125.157,542.06,0.15,0.247,0.842,-20.489'],
  [/BETA2007/, ' +towgs84=598.1,73.7,418.2,0.202,0.045,-2.455,6.7'],
];

function definitionOf(entry: EpsgEntry): string | null {
  if (!/^CRS-(PROJCRS|GEOGCRS|GEOG3DCRS)$/.test(entry.kind) || !entry.proj4) return null;
  if (entry.kind !== 'CRS-PROJCRS' && entry.unit !== null && !entry.unit.startsWith('degree')) return null;
  const grid = gridShift.exec(entry.proj4)?.[0];
  if (grid === undefined) return entry.proj4;
  const shift = insteadOfGrid.find(([pattern]) => pattern.test(grid))?.[1] ?? '';
  return entry.proj4.replace(gridShift, shift);
}

function crsOf(name: string, epsg: number | null, definition: string): Crs {
  let parsed: { a?: number; b?: number; to_meter?: number; axis?: string; projName?: string };
  try {
    parsed = new proj4.Proj(definition);
  } catch (cause) {
    throw unknown(
      `${epsg === null ? name : `EPSG:${epsg} (${name})`} uses a method that is not known`,
      cause,
    );
  }
  const { a, b } = parsed;
  if (a === undefined || b === undefined) throw unknown(`The ellipsoid of ${name} is not known`);
  if (parsed.axis !== undefined && parsed.axis !== 'enu') {
    throw unknown(`The axes of EPSG:${epsg} (${name}) do not run east and north`);
  }
  const geographic = parsed.projName === 'longlat';
  return {
    kind: geographic ? 'geographic' : 'projected',
    name,
    epsg,
    proj4: definition.trim(),
    unitM: geographic ? null : (parsed.to_meter ?? 1),
    semiMajorM: a,
    semiMinorM: b,
  };
}

/** A file may repeat the unit beside its code, but not give another. */
function sameUnit(crs: Crs, geoKeys: GeoKeys, name: string): Crs {
  const unit = numberKey(geoKeys, keys.linearUnits);
  const said = unit === null ? undefined : linearUnitM.get(unit);
  if (crs.unitM !== null && said !== undefined && Math.abs(said / crs.unitM - 1) > 1e-9) {
    throw new OverbrimError(
      'unsupported',
      `${name} names EPSG:${crs.epsg} (${crs.name}), whose unit is ${crs.unitM} m, but gives another unit (key 3076: ${said} m); mend the keys so that both agree.`,
    );
  }
  return crs;
}

/** Metres by EPSG unit code: metre, foot, US survey foot. */
export const linearUnitM: ReadonlyMap<number, number> = new Map([
  [9001, 1],
  [9002, 0.3048],
  [9003, 1200 / 3937],
]);

function unknown(found: string, cause?: unknown): OverbrimError {
  return new OverbrimError(
    'unsupported',
    `${found}; expected a projected or geographic CRS, so give the file the CRS that it is in.`,
    { cause },
  );
}
