/* global ol */
// The town's own map, as the keeper of its page wrote it: web mercator, the town's files, a global variable.
const covers = { water: '#9cc4dd', woods: '#c3d9b1', residential: '#ece5da', commercial: '#e6ddd6' };

function layer(name, style) {
  const source = new ol.source.Vector({ url: `../town/${name}.geojson`, format: new ol.format.GeoJSON() });
  return new ol.layer.Vector({ source, style });
}

function filled(colour, edge) {
  const stroke = edge && new ol.style.Stroke({ color: edge, width: 0.75 });
  return new ol.style.Style({ fill: new ol.style.Fill({ color: colour }), stroke });
}

window.map = new ol.Map({
  target: 'map',
  view: new ol.View({ center: ol.proj.fromLonLat([-123.3962, -48.8693]), zoom: 14.5 }),
  layers: [
    layer('land-cover', (feature) => filled(covers[feature.get('cover')] ?? '#e0ebcf')),
    layer('streets', new ol.style.Style({ stroke: new ol.style.Stroke({ color: '#fff', width: 4 }) })),
    layer('buildings', filled('#cfa78f', '#8f6a55')),
  ],
});
