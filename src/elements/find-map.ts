import type OlMap from 'ol/Map.js';
import { checkMap } from '../map/check-map.ts';
import type { MessageKey } from './messages.ts';
import type { Values } from './words.ts';

/** The map that a host shall use, or why there is none. */
export type MapFound = { readonly map: OlMap } | { readonly missing: MessageKey; readonly values?: Values };

/**
 * The map handed over as an object, by the name of a global variable, or by the id of an element with a property map.
 * @throws OverbrimError `bad-input` for something that is no map of our OpenLayers.
 */
export function findMap(given: unknown, id: string | null, root: Document | ShadowRoot): MapFound {
  if (typeof given === 'string' && given !== '') {
    const value: unknown = Reflect.get(globalThis, given);
    // An element whose id is the name of the variable is a global too, and no map.
    if (value === undefined || value === null || value instanceof Element) {
      return { missing: 'noMapNamed', values: { name: given } };
    }
    return { map: checkMap(value) };
  }
  if (given) return { map: checkMap(given) };
  if (id === null) return { missing: 'noMap' };
  const element = root.getElementById(id) ?? document.getElementById(id);
  const value: unknown = element ? Reflect.get(element, 'map') : undefined;
  if (value === undefined || value === null) return { missing: 'noMapFor', values: { id } };
  return { map: checkMap(value) };
}
