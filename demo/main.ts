import 'overbrim/elements';
import { defaults } from 'ol/control/defaults.js';
import ScaleLine from 'ol/control/ScaleLine.js';
import OlMap from 'ol/Map.js';
import { printWhole } from './print-whole.ts';
import { townLayers } from './town-layers.ts';
import { townView } from './town-view.ts';

const map = new OlMap({
  target: 'map',
  view: townView(),
  layers: townLayers('town/', matchMedia('(prefers-color-scheme: dark)')),
  controls: defaults({ attribution: false, rotate: false }).extend([new ScaleLine()]),
});

const host = document.querySelector('brim-host');
if (host) host.map = map;
printWhole(map);
