import { OverbrimError } from '../core/error.ts';
import { type EpsgLookup, packagedEpsg } from './epsg.ts';
import { type GeoKeys, keys, numberKey, textKey, userDefined } from './geo-keys.ts';
import type { VerticalUnit } from './terrain.ts';

/** Metres in one unit: international foot 0.3048, US survey foot 1200/3937 (NIST Handbook 44, appendix C). */
export const verticalUnitM: Readonly<Record<VerticalUnit, number>> = {
  m: 1,
  ft: 0.3048,
  'us-ft': 1200 / 3937,
};

/** What a file's values measure. */
export interface Vertical {
  readonly unit: VerticalUnit;
  /** Name of the datum, null when the file does not tell. */
  readonly datum: string | null;
  /** Values are depths, positive downwards. */
  readonly downwards: boolean;
}

interface Told {
  unit: VerticalUnit | null;
  datum: string | null;
  downwards: boolean;
}

/**
 * Unit and datum from the vertical keys (OGC GeoTIFF 1.1: 4096 vertical CRS, 4099 units), or the unit from the
 * caller. The horizontal unit says nothing about heights: many files mix feet and metres.
 * @throws OverbrimError `unit-missing` without either, `bad-input` when both differ, `unsupported` for another unit.
 */
export async function verticalOf(
  geoKeys: GeoKeys,
  name: string,
  asked: VerticalUnit | undefined,
  lookup: EpsgLookup = packagedEpsg,
): Promise<Vertical> {
  const told = await fromCode(geoKeys, name, lookup);
  const unit = oneUnit(told.unit, unitKey(geoKeys, name), name);
  if (unit !== null && asked !== undefined && asked !== unit) {
    throw new OverbrimError(
      'bad-input',
      `${name} says that its elevations are in ${words[unit]}, but --vertical-unit ${asked} was given; leave the option out or mend the file.`,
    );
  }
  const found = unit ?? asked;
  if (found === undefined) {
    throw new OverbrimError(
      'unit-missing',
      `${name} does not say in which unit its elevations are; give --vertical-unit m|ft|us-ft.`,
    );
  }
  return { unit: found, datum: told.datum, downwards: told.downwards };
}

const words: Readonly<Record<VerticalUnit, string>> = { m: 'metres', ft: 'feet', 'us-ft': 'US survey feet' };

async function fromCode(geoKeys: GeoKeys, name: string, lookup: EpsgLookup): Promise<Told> {
  const citation = textKey(geoKeys, keys.verticalCitation);
  const code = numberKey(geoKeys, keys.vertical);
  if (code === null || code === userDefined || code === 0)
    return { unit: null, datum: citation, downwards: false };
  const entry = await lookup(code);
  if (entry?.kind === 'CRS-GEOG3DCRS')
    return { unit: 'm', datum: `ellipsoid of ${entry.name}`, downwards: false };
  if (entry?.kind !== 'CRS-VERTCRS')
    return { unit: null, datum: citation ?? `code ${code}`, downwards: false };
  const unit = /\+vunits=(\S+)/.exec(entry.proj4 ?? '')?.[1];
  if (unit !== 'm' && unit !== 'ft' && unit !== 'us-ft') {
    throw new OverbrimError(
      'unsupported',
      `${name} has heights of EPSG:${code} (${entry.name}) in unit "${entry.unit}"; expected metres, feet or US survey feet, so convert them first.`,
    );
  }
  const datum = /VERT_DATUM\["([^"]*)"/.exec(entry.wkt ?? '')?.[1] ?? entry.name;
  return { unit, datum, downwards: /AXIS\["[^"]*",DOWN\]/.test(entry.wkt ?? '') };
}

function unitKey(geoKeys: GeoKeys, name: string): VerticalUnit | null {
  const code = numberKey(geoKeys, keys.verticalUnits);
  if (code === null || code === 0) return null;
  const unit = ({ 9001: 'm', 9002: 'ft', 9003: 'us-ft' } as const)[code];
  if (unit === undefined) {
    throw new OverbrimError(
      'unsupported',
      `${name} has elevations in unit EPSG:${code}; expected 9001 (metre), 9002 (foot) or 9003 (US survey foot), so convert them first.`,
    );
  }
  return unit;
}

function oneUnit(byCode: VerticalUnit | null, byKey: VerticalUnit | null, name: string): VerticalUnit | null {
  if (byCode !== null && byKey !== null && byCode !== byKey) {
    throw new OverbrimError(
      'unsupported',
      `${name} contradicts itself: its vertical CRS is in ${words[byCode]}, its vertical unit key says ${words[byKey]}; mend the keys so that both agree.`,
    );
  }
  return byCode ?? byKey;
}
