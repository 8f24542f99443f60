import type Feature from 'ol/Feature.js';
import type { FeatureLike } from 'ol/Feature.js';
import GeoJSON from 'ol/format/GeoJSON.js';
import VectorLayer from 'ol/layer/Vector.js';
import VectorSource from 'ol/source/Vector.js';
import Fill from 'ol/style/Fill.js';
import Stroke from 'ol/style/Stroke.js';
import Style, { type StyleFunction } from 'ol/style/Style.js';
import Text from 'ol/style/Text.js';
import { dayInks, type Inks, nightInks } from './town-inks.ts';

/** Names of streets appear when the view shows less than so many metres a pixel. */
const namesFromM = 1.6;

/** Land cover, streets, buildings and street names, in the inks of the page's tone. */
export function townLayers(folder: string, dark: MediaQueryList): VectorLayer[] {
  const streets = file('streets');
  const drawn: { layer: VectorLayer; style: (inks: Inks) => StyleFunction }[] = [
    { layer: new VectorLayer({ source: file('land-cover') }), style: coverStyle },
    { layer: new VectorLayer({ source: streets }), style: streetStyle },
    { layer: new VectorLayer({ source: file('buildings') }), style: buildingStyle },
    // Above everything, so that names stay readable.
    { layer: new VectorLayer({ source: streets, declutter: true, zIndex: 1 }), style: nameStyle },
  ];
  const ink = (): void => {
    for (const { layer, style } of drawn) layer.setStyle(style(dark.matches ? nightInks : dayInks));
  };
  ink();
  dark.addEventListener('change', ink);
  return drawn.map(({ layer }) => layer);

  function file(name: string): VectorSource {
    return new VectorSource({ url: `${folder}${name}.geojson`, format: new GeoJSON<Feature>() });
  }
}

function coverStyle({ cover, ground }: Inks): StyleFunction {
  return (feature) => new Style({ fill: new Fill({ color: cover[String(feature.get('cover'))] ?? ground }) });
}

function streetStyle({ street, kerb }: Inks): StyleFunction {
  return (feature, resolution) => {
    const width = Math.max(1.5, Number(feature.get('widthM')) / resolution);
    return [
      new Style({ stroke: new Stroke({ color: kerb, width: width + 1.5, lineCap: 'butt' }) }),
      new Style({ stroke: new Stroke({ color: street, width, lineCap: 'round' }), zIndex: 1 }),
    ];
  };
}

function buildingStyle({ building, wall }: Inks): StyleFunction {
  const style = new Style({
    fill: new Fill({ color: building }),
    stroke: new Stroke({ color: wall, width: 0.75 }),
  });
  return () => style;
}

function nameStyle({ name, halo }: Inks): StyleFunction {
  return (feature: FeatureLike, resolution) =>
    resolution > namesFromM
      ? []
      : new Style({
          text: new Text({
            text: String(feature.get('name')),
            placement: 'line',
            font: '500 11px system-ui, sans-serif',
            fill: new Fill({ color: name }),
            stroke: new Stroke({ color: halo, width: 3 }),
          }),
        });
}
