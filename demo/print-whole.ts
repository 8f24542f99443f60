import type OlMap from 'ol/Map.js';

/** Shows on paper the same extent as on the screen; the class `prints` on the page gives the map its size there. */
export function printWhole(map: OlMap): void {
  const page = document.documentElement.classList;
  let before: { center: number[]; resolution: number } | undefined;
  addEventListener('beforeprint', () => {
    const view = map.getView();
    const center = view.getCenter();
    const resolution = view.getResolution();
    if (before || !center || resolution === undefined) return;
    before = { center, resolution };
    const extent = view.calculateExtent(map.getSize());
    page.add('prints');
    map.updateSize();
    view.fit(extent, { size: map.getSize() });
    map.renderSync();
  });
  addEventListener('afterprint', () => {
    page.remove('prints');
    map.updateSize();
    if (before) {
      map.getView().setCenter(before.center);
      map.getView().setResolution(before.resolution);
    }
    before = undefined;
  });
}
