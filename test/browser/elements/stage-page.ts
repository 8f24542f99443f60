import '../../../src/elements/index.ts';
import OlMap from 'ol/Map.js';
import { fromLonLat } from 'ol/proj.js';
import View from 'ol/View.js';

// A page that makes its map by itself, in web mercator, and hands it to the host as a global variable.
const map = new OlMap({
  target: 'map',
  controls: [],
  view: new View({ center: fromLonLat([0, 0]), zoom: 2 }),
});
Object.assign(globalThis, { townMap: map });
