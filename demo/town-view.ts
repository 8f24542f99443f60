import { getCenter } from 'ol/extent.js';
import { register } from 'ol/proj/proj4.js';
import { get } from 'ol/proj.js';
import View from 'ol/View.js';
import proj4 from 'proj4';

/** West, south, east, north of the town in UTM zone 10 south (EPSG:32710), metres. */
const town = [470_000, 4_586_000, 472_000, 4_588_000];
const aroundM = 1500;

/** A view in the CRS of the town's terrain, so that its cells stand upright. */
export function townView(): View {
  proj4.defs('EPSG:32710', '+proj=utm +zone=10 +south +datum=WGS84 +units=m +no_defs');
  register(proj4);
  const [west, south, east, north] = town;
  const extent = [west - aroundM, south - aroundM, east + aroundM, north + aroundM];
  get('EPSG:32710')?.setExtent(extent);
  return new View({
    projection: 'EPSG:32710',
    center: getCenter(town),
    resolution: 2.5,
    minResolution: 0.1,
    maxResolution: 8,
    extent,
    showFullExtent: true,
  });
}
