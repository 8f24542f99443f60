/// The page of the browser tests: a map, the layers under test, and what the tests ask of them.
import type { FeatureCollection } from 'geojson';
import type MultiPolygon from 'ol/geom/MultiPolygon.js';
import OlMap from 'ol/Map.js';
import { transform } from 'ol/proj.js';
import { VERSION } from 'ol/util.js';
import View from 'ol/View.js';
import type { SurveyView } from '../../../src/map/index.ts';
import { darkPalette, lightPalette, SurveyLayers, terrainProjection } from '../../../src/map/index.ts';
import { fromCrs84 } from '../../../src/raster/transform.ts';

type Scene = {
  view: Omit<SurveyView, 'elevationM' | 'leaf' | 'levelM' | 'pondOfLeaf'>;
  ponds: FeatureCollection;
  pourPoints: FeatureCollection;
  path: FeatureCollection;
};

export interface ViewWish {
  readonly projection: 'EPSG:3857' | 'terrain';
  /** Longitude and latitude. */
  readonly center: [number, number];
  /** Cells in a CSS pixel. */
  readonly cellsPerPixel: number;
  readonly rotationDeg: number;
}

declare global {
  interface Window {
    stage: typeof stage;
  }
}

const magenta = [255, 0, 255] as const;

async function numbers<T>(name: string, made: new (buffer: ArrayBuffer) => T): Promise<T> {
  return new made(await (await fetch(name)).arrayBuffer());
}

async function load(): Promise<{ scene: Scene; survey: SurveyView }> {
  const scene: Scene = await (await fetch('scene.json')).json();
  const survey: SurveyView = {
    ...scene.view,
    elevationM: await numbers('elevationM', Float32Array),
    leaf: await numbers('leaf', Int32Array),
    levelM: await numbers('levelM', Float32Array),
    pondOfLeaf: await numbers('pondOfLeaf', Int32Array),
  };
  return { scene, survey };
}

const { scene, survey } = await load();
const map = new OlMap({ target: 'map', controls: [], view: new View({ center: [0, 0], zoom: 1 }) });
const layers = new SurveyLayers(map);
layers.setSurvey(survey);
layers.setPonds(scene.ponds, scene.pourPoints);

const settled = (): Promise<void> =>
  new Promise((done) => {
    map.once('rendercomplete', () => requestAnimationFrame(() => requestAnimationFrame(() => done())));
    map.render();
  });

async function look({ projection, center, cellsPerPixel, rotationDeg }: ViewWish): Promise<void> {
  const { georeference } = survey;
  const own = terrainProjection(georeference);
  const isOwn = projection === 'terrain';
  const stretch = isOwn ? 1 : 1 / Math.cos((center[1] * Math.PI) / 180);
  map.setView(
    new View({
      projection: isOwn ? own : projection,
      center: transform(center, 'EPSG:4326', isOwn ? own : projection),
      resolution: cellsPerPixel * georeference.cellWidth * stretch,
      rotation: (rotationDeg * Math.PI) / 180,
      constrainResolution: false,
      enableRotation: true,
      maxResolution: 1e6,
      minResolution: 1e-3,
      multiWorld: true,
    }),
  );
  await settled();
}

/** Only water in one colour that nothing else has. */
async function onlyWater(): Promise<void> {
  for (const layer of layers.group.getLayers().getArray()) layer.setVisible(layer === layers.wet);
  layers.wet.setClasses([{ fromM: 0, colour: magenta, label: 'wet' }]);
  await settled();
}

/** Device pixels of the map on a screenshot: colour against the polygon under each pixel's centre. */
async function compare(
  png: string,
): Promise<{ pixels: number; wet: number; blurred: number; wrong: string[] }> {
  const bytes = Uint8Array.from(atob(png), (letter) => letter.charCodeAt(0));
  const bitmap = await createImageBitmap(new Blob([bytes], { type: 'image/png' }));
  const context = new OffscreenCanvas(bitmap.width, bitmap.height).getContext('2d');
  if (!context) throw new Error('no canvas');
  context.drawImage(bitmap, 0, 0);
  const { data, width } = context.getImageData(0, 0, bitmap.width, bitmap.height);
  const rect = map.getViewport()?.getBoundingClientRect() ?? new DOMRect();
  const ratio = window.devicePixelRatio;
  const outlines = [...layers.ponds.values()].map(({ outline }) => outline.getGeometry() as MultiPolygon);
  const boxes = outlines.map((outline) => outline.getExtent());
  const toTerrain = fromCrs84(survey.georeference.crs);
  const found = { pixels: 0, wet: 0, blurred: 0, wrong: [] as string[] };
  const first = (side: number) => Math.ceil(side * ratio);
  const last = (side: number) => Math.floor(side * ratio);
  for (let j = first(rect.top); j < last(rect.bottom); j++) {
    for (let i = first(rect.left); i < last(rect.right); i++) {
      const at = (j * width + i) * 4;
      const [red, green, blue] = [data[at], data[at + 1], data[at + 2]];
      const isWet = red === 255 && green === 0 && blue === 255;
      if (!isWet && !(red === 255 && green === 255 && blue === 255)) found.blurred++;
      const [x, y] = map.getCoordinateFromPixel([
        (i + 0.5) / ratio - rect.left,
        (j + 0.5) / ratio - rect.top,
      ]);
      const inside = outlines.some(
        (outline, k) =>
          x >= boxes[k][0] &&
          x <= boxes[k][2] &&
          y >= boxes[k][1] &&
          y <= boxes[k][3] &&
          outline.intersectsCoordinate([x, y]),
      );
      found.pixels++;
      if (inside) found.wet++;
      if (inside !== isWet && !nearSide(x, y)) found.wrong.push(`${i},${j}`);
    }
  }
  return found;

  /** Within a hundredth of a cell of a side both answers are right: outlines are rounded to 1e-7 degrees. */
  function nearSide(x: number, y: number): boolean {
    const { west, north, cellWidth, cellHeight } = survey.georeference;
    const [longitude, latitude] = transform([x, y], map.getView().getProjection(), 'EPSG:4326');
    const [e, n] = toTerrain(longitude, latitude);
    const off = (value: number) => Math.abs(value - Math.round(value));
    return Math.min(off((e - west) / cellWidth), off((north - n) / cellHeight)) < 0.01;
  }
}

/** Read-outs at the middle of cells against the grid. */
function readBack(step: number): { asked: number; wrong: number; wet: number } {
  const { west, north, cellWidth, cellHeight } = survey.georeference;
  const own = terrainProjection(survey.georeference);
  const found = { asked: 0, wrong: 0, wet: 0 };
  for (let cell = 0; cell < survey.elevationM.length; cell += step) {
    const column = cell % survey.width;
    const row = Math.floor(cell / survey.width);
    const place = [west + (column + 0.5) * cellWidth, north - (row + 0.5) * cellHeight];
    const answer = layers.readOut(transform(place, own, map.getView().getProjection()));
    const ground = survey.elevationM[cell];
    const isVoid = Number.isNaN(ground);
    const level = survey.levelM[survey.leaf[cell]];
    const depth = isVoid ? null : Number.isFinite(level) ? Math.max(0, level - ground) : 0;
    found.asked++;
    if (depth) found.wet++;
    const pond = depth ? survey.ponds[survey.pondOfLeaf[survey.leaf[cell]]] : null;
    if (
      answer?.cell !== cell ||
      answer.groundM !== (isVoid ? null : ground) ||
      answer.depthM !== depth ||
      answer.pond !== pond
    ) {
      found.wrong++;
    }
  }
  return found;
}

/** Times in milliseconds: medians of `rounds`. */
async function times(rounds: number): Promise<Record<string, number>> {
  const median = (values: number[]) => values.sort((a, b) => a - b)[values.length >> 1];
  const time = (act: () => void) =>
    median(
      Array.from({ length: rounds }, () => {
        const start = performance.now();
        act();
        return performance.now() - start;
      }),
    );
  const view = map.getView();
  const recolour = time(() => layers.wet.setClasses(lightPalette.depths));
  const reliefAnew = time(() => layers.relief.setPalette(lightPalette));
  let turn = 0;
  const show = (shown: readonly unknown[]) => {
    for (const layer of layers.group.getLayers().getArray()) layer.setVisible(shown.includes(layer));
    map.renderSync();
  };
  const frame = () => {
    const [x, y] = view.getCenter() ?? [0, 0];
    const step = (turn++ % 2 === 0 ? 3 : -3) * (view.getResolution() ?? 1);
    view.setCenter([x + step, y]);
    map.renderSync();
  };
  show([]);
  const bareFrame = time(frame);
  show([layers.wet]);
  const wetFrame = time(frame);
  show([layers.wet, layers.relief]);
  const wetAndReliefFrame = time(frame);
  const still = time(() => map.renderSync());
  show(layers.group.getLayers().getArray());
  return { recolour, reliefAnew, bareFrame, wetFrame, wetAndReliefFrame, still };
}

const stage = {
  version: VERSION,
  map,
  layers,
  survey,
  scene,
  darkPalette,
  SurveyLayers,
  look,
  settled,
  onlyWater,
  compare,
  readBack,
  times,
  lightPalette,
};
export type Stage = typeof stage;

window.stage = stage;
document.body.dataset.ready = 'yes';
