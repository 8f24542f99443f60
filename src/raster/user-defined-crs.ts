import { type GeoKeys, keys, numberKey, userDefined } from './geo-keys.ts';

/** Names that the library below expects, by key (OGC GeoTIFF 1.1, annex B, older names). */
const libraryNames: Record<number, string> = {
  1024: 'GTModelTypeGeoKey',
  2048: 'GeographicTypeGeoKey',
  2050: 'GeogGeodeticDatumGeoKey',
  2051: 'GeogPrimeMeridianGeoKey',
  2054: 'GeogAngularUnitsGeoKey',
  2055: 'GeogAngularUnitSizeGeoKey',
  2056: 'GeogEllipsoidGeoKey',
  2057: 'GeogSemiMajorAxisGeoKey',
  2058: 'GeogSemiMinorAxisGeoKey',
  2059: 'GeogInvFlatteningGeoKey',
  2061: 'GeogPrimeMeridianLongGeoKey',
  2062: 'GeogTOWGS84GeoKey',
  3072: 'ProjectedCSTypeGeoKey',
  3074: 'ProjectionGeoKey',
  3075: 'ProjCoordTransGeoKey',
  3076: 'ProjLinearUnitsGeoKey',
  3077: 'ProjLinearUnitSizeGeoKey',
  3078: 'ProjStdParallel1GeoKey',
  3079: 'ProjStdParallel2GeoKey',
  3080: 'ProjNatOriginLongGeoKey',
  3081: 'ProjNatOriginLatGeoKey',
  3082: 'ProjFalseEastingGeoKey',
  3083: 'ProjFalseNorthingGeoKey',
  3084: 'ProjFalseOriginLongGeoKey',
  3085: 'ProjFalseOriginLatGeoKey',
  3086: 'ProjFalseOriginEastingGeoKey',
  3087: 'ProjFalseOriginNorthingGeoKey',
  3088: 'ProjCenterLongGeoKey',
  3089: 'ProjCenterLatGeoKey',
  3090: 'ProjCenterEastingGeoKey',
  3091: 'ProjCenterNorthingGeoKey',
  3092: 'ProjScaleAtNatOriginGeoKey',
  3093: 'ProjScaleAtCenterGeoKey',
  3094: 'ProjAzimuthAngleGeoKey',
  3095: 'ProjStraightVertPoleLongGeoKey',
  3096: 'ProjRectifiedGridAngleGeoKey',
};

/** A library result: the definition speaks metres, the factor leads from the file's unit to them. */
interface Converted {
  readonly proj4: string;
  readonly coordinatesConversionParameters: { readonly x: number };
  readonly errors: Readonly<Record<string, unknown>>;
}

/** The proj4 definition of a CRS given by its parameters; null when they do not make one. */
export async function userDefinedProj4(geoKeys: GeoKeys, projected: boolean): Promise<string | null> {
  const named: Record<string, unknown> = {};
  for (const [key, value] of geoKeys.values) {
    if (libraryNames[key] !== undefined) named[libraryNames[key]] = value;
  }
  const angular = numberKey(geoKeys, keys.angularUnits);
  if (!projected && angular !== null && angular !== 9102 && angular !== 9122) return null;
  if (projected && numberKey(geoKeys, keys.linearUnits) === null) return null;
  // The package holds a table of methods and weighs over a megabyte: only loaded for such files.
  const { toProj4 } = (await import('geotiff-geokeys-to-proj4')) as unknown as {
    toProj4: (keys: Record<string, unknown>) => Converted;
  };
  let converted: Converted;
  try {
    converted = toProj4(named);
  } catch {
    return null;
  }
  // Both a geographic and a projected part being there is how every projected CRS is written.
  if (Object.keys(converted.errors).some((error) => error !== 'bothGCSAndPCSAreSet')) return null;
  const definition = converted.proj4.replace(/\s*\+axis=\S*/, '').trim();
  if (!/\+(a|ellps|datum|R)=/.test(definition)) return null;
  if (projected === /\+proj=longlat/.test(definition)) return null;
  if (!projected) return definition;
  const unit = unitM(geoKeys, converted);
  return unit === 1 ? definition : `${definition} +to_meter=${unit}`;
}

/** Metres in one unit of a user-defined projected CRS. */
function unitM(geoKeys: GeoKeys, converted: Converted): number {
  const unit = numberKey(geoKeys, keys.linearUnits);
  if (unit === userDefined) return numberKey(geoKeys, keys.linearUnitSize) ?? 1;
  if (unit === 9002) return 0.3048;
  return unit === 9003 ? 1200 / 3937 : converted.coordinatesConversionParameters.x;
}
