import '../../../src/elements/index.ts';
import VectorLayer from 'ol/layer/Vector.js';
import OlMap from 'ol/Map.js';
import Projection from 'ol/proj/Projection.js';
import { fromLonLat, toLonLat } from 'ol/proj.js';
import View from 'ol/View.js';
import type { SessionState } from '../../../src/elements/session.ts';

/** A map that the page makes by itself, in web mercator. */
const townMap = new OlMap({
  target: 'map',
  controls: [],
  view: new View({ center: fromLonLat([0, 0]), zoom: 2 }),
});

function mapOnPage(): DOMRect {
  const element = document.getElementById('map');
  if (!element) throw new Error('The page has no place for a map.');
  return element.getBoundingClientRect();
}

/** What tests ask of the page. */
const elementsStage = {
  state(): SessionState {
    const host = document.querySelector('brim-host');
    if (!host) throw new Error('The page has no host.');
    return host.session.state;
  },

  /** Where a listed pond lies on the page, once the view has come to rest. */
  async pixelInside(place: number): Promise<{ x: number; y: number }> {
    const { layers, ponds } = elementsStage.state();
    const inside = layers?.ponds.get(ponds?.list[place]?.id ?? '')?.inside;
    if (!inside) throw new Error(`The map has no pond at place ${place} of the list.`);
    await new Promise<void>((done) => {
      townMap.once('rendercomplete', () => done());
      townMap.render();
    });
    const [x, y] = townMap.getPixelFromCoordinate([...inside]) ?? [];
    const { left, top } = mapOnPage();
    return { x: left + x, y: top + y };
  },

  /** The place under a pixel of the page, as a reader may type it. */
  typedAt(x: number, y: number): { view: string; lonLat: string } {
    const { left, top } = mapOnPage();
    const place = townMap.getCoordinateFromPixel([x - left, y - top]) ?? [];
    return { view: place.join(' '), lonLat: toLonLat(place).join(', ') };
  },

  /** A view in a plane of its own, as pages have it for plans without a CRS. */
  useUnknownProjection(): void {
    const projection = new Projection({ code: 'LOCAL-GRID', units: 'm', extent: [0, 0, 1e6, 1e6] });
    townMap.setView(new View({ projection, center: [5e5, 5e5], zoom: 4 }));
  },

  useMercator(): void {
    townMap.setView(new View({ center: fromLonLat([0, 0]), zoom: 2 }));
  },

  path: (): string => JSON.stringify(elementsStage.state().path?.lines),

  /** Lines drawn under the path, to mark a leg. */
  markedLegs(): number {
    const { layers } = elementsStage.state();
    const all = layers?.group.getLayers().getArray() ?? [];
    const below = all.find((_, i) => all[i + 1] === layers?.path);
    if (!(below instanceof VectorLayer)) throw new Error('No layer lies under the path.');
    return below.getSource()?.getFeatures().length ?? 0;
  },
};

declare global {
  interface Window {
    townMap: OlMap;
    elementsStage: typeof elementsStage;
  }
}

Object.assign(window, { townMap, elementsStage });
