import OlMap from 'ol/Map.js';
import { OverbrimError } from '../core/error.ts';

/**
 * The given value as a map of the OpenLayers that our layers are derived from.
 * @throws OverbrimError `bad-input` for anything else, a map of a second copy of OpenLayers above all.
 */
export function checkMap(map: unknown): OlMap {
  if (map instanceof OlMap) return map;
  if (looksLikeMap(map)) {
    throw new OverbrimError(
      'bad-input',
      'The map was made by another copy of OpenLayers than the one that Overbrim found, and two copies cannot share layers; load OpenLayers once and make the map with that copy (by script tag the global "ol", in a bundle a single installed "ol").',
    );
  }
  throw new OverbrimError(
    'bad-input',
    `${described(map)} was given as the map; expected an OpenLayers Map, so pass the object that new Map(…) returned.`,
  );
}

function looksLikeMap(value: unknown): boolean {
  return (
    typeof value === 'object' &&
    value !== null &&
    ['addLayer', 'getView', 'getTargetElement'].every(
      (name) => typeof Reflect.get(value, name) === 'function',
    )
  );
}

function described(value: unknown): string {
  if (value === null || value === undefined) return 'Nothing';
  if (typeof value !== 'object') return `A ${typeof value}`;
  return `An object of kind ${value.constructor?.name ?? 'Object'}`;
}
