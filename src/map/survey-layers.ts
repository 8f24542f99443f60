import type { FeatureCollection } from 'geojson';
import Feature from 'ol/Feature.js';
import GeoJSON from 'ol/format/GeoJSON.js';
import LineString from 'ol/geom/LineString.js';
import Point from 'ol/geom/Point.js';
import LayerGroup from 'ol/layer/Group.js';
import VectorLayer from 'ol/layer/Vector.js';
import type OlMap from 'ol/Map.js';
import VectorSource from 'ol/source/Vector.js';
import type { OverbrimError } from '../core/error.ts';
import { checkMap } from './check-map.ts';
import { OutlineLayers } from './outline-layers.ts';
import { linkLine, overflowBearing } from './overflow.ts';
import { lightPalette, type Palette } from './palette.ts';
import { pathStyle } from './path-styles.ts';
import { PixelCells } from './pixel-cells.ts';
import { type PondOnView, pondsOnView } from './pond-features.ts';
import { linkStyle, outlineStyle, pourPointStyle, selectedStyle } from './pond-styles.ts';
import { hasNoWay, terrainProjection } from './projections.ts';
import { type ReadOut, readOut } from './read-out.ts';
import { ReliefLayer } from './relief-layer.ts';
import type { SurveyView } from './survey-view.ts';
import { WetLayer } from './wet-layer.ts';

/**
 * All that Overbrim shows on a map, in one layer group: relief, water, shores, links, what is selected, the spill
 * path, pour points. Follows the map when its view changes to another projection.
 */
export class SurveyLayers {
  readonly map: OlMap;
  readonly relief: ReliefLayer;
  readonly wet: WetLayer;
  readonly outlines = new OutlineLayers();
  readonly links = new VectorLayer({ source: new VectorSource() });
  readonly selection = new VectorLayer({ source: new VectorSource() });
  readonly path = new VectorLayer({ source: new VectorSource() });
  readonly pourPoints = new VectorLayer({ source: new VectorSource() });
  readonly group: LayerGroup;
  #survey: SurveyView | undefined;
  #ponds: Map<string, PondOnView> = new Map();
  #drawn: { ponds?: [FeatureCollection, FeatureCollection]; path?: FeatureCollection } = {};
  #selected: string | null = null;
  #cells: PixelCells | undefined;
  #problem: OverbrimError | null = null;
  readonly #onView = (): void => this.#draw();

  /** @throws OverbrimError `bad-input` when the map is none of our OpenLayers. */
  constructor(map: unknown, palette: Palette = lightPalette) {
    this.map = checkMap(map);
    this.relief = new ReliefLayer(undefined, palette);
    this.wet = new WetLayer();
    this.setPalette(palette);
    this.group = new LayerGroup({
      layers: [this.relief, this.wet, this.outlines, this.links, this.selection, this.path, this.pourPoints],
      properties: { name: 'overbrim' },
    });
    this.map.addLayer(this.group);
    this.map.on('change:view', this.#onView);
  }

  /** Ponds by id, as they lie in the view. */
  get ponds(): ReadonlyMap<string, PondOnView> {
    return this.#ponds;
  }

  /** Why nothing is shown of the survey: no way is known from the view's projection; null when there is one. */
  get problem(): OverbrimError | null {
    return this.#problem;
  }

  /** Shows a survey's relief and water, and forgets what was drawn of another. */
  setSurvey(survey: SurveyView | undefined): void {
    this.#survey = survey;
    if (survey) terrainProjection(survey.georeference);
    this.#cells = survey && new PixelCells(survey);
    this.#drawn = {};
    this.#selected = null;
    this.#draw();
  }

  /** Draws the outputs of the process `depressions`. */
  setPonds(ponds: FeatureCollection, pourPoints: FeatureCollection): void {
    this.#drawn.ponds = [ponds, pourPoints];
    this.#draw();
  }

  /** Draws the output of the process `spill-path`, or none. */
  setPath(path: FeatureCollection | undefined): void {
    if (path) this.#drawn.path = path;
    else delete this.#drawn.path;
    this.#drawPath();
  }

  /** Marks a pond; null marks none. An id that is not drawn marks nothing. */
  select(id: string | null): void {
    this.#selected = id;
    this.#drawSelection();
  }

  setPalette(palette: Palette): void {
    this.relief.setPalette(palette);
    this.wet.setClasses(palette.depths);
    this.outlines.setStyle(outlineStyle(palette));
    this.links.setStyle(linkStyle(palette));
    this.selection.setStyle(selectedStyle(palette));
    this.path.setStyle(pathStyle(palette));
    this.pourPoints.setStyle(pourPointStyle(palette));
  }

  /** What the grid says at a coordinate of the view; null beside the terrain or without one. */
  readOut(coordinate: readonly number[]): ReadOut | null {
    if (!this.#survey || this.#problem) return null;
    return readOut(this.#survey, this.#projection(), coordinate, this.wet.levelM);
  }

  /** Takes everything off the map. */
  remove(): void {
    this.map.un('change:view', this.#onView);
    this.map.removeLayer(this.group);
    for (const layer of this.group.getLayersArray()) layer.dispose();
  }

  #projection() {
    return this.map.getView().getProjection();
  }

  #draw(): void {
    const survey = this.#survey;
    this.#problem = survey ? hasNoWay(this.#projection(), survey.georeference.crs) : null;
    const cells = this.#problem ? undefined : this.#cells;
    if (this.relief.pixelCells !== cells) {
      this.relief.setPixelCells(cells);
      this.wet.setPixelCells(cells);
    }
    const [ponds, pourPoints] = (this.#problem ? undefined : this.#drawn.ponds) ?? [];
    this.#ponds = ponds && pourPoints ? pondsOnView(ponds, pourPoints, this.#projection()) : new Map();
    const all = [...this.#ponds.values()];
    this.outlines.show(all.map(({ outline }) => outline));
    show(this.links, all.flatMap(linkFeature));
    show(this.pourPoints, all.flatMap(pourPointFeature));
    this.#drawSelection();
    this.#drawPath();
  }

  #drawSelection(): void {
    const pond = this.#selected === null ? undefined : this.#ponds.get(this.#selected);
    show(this.selection, pond ? [pond.outline.clone(), ...pourPointFeature(pond)] : []);
  }

  #drawPath(): void {
    const path = this.#problem ? undefined : this.#drawn.path;
    if (!path) {
      show(this.path, []);
      return;
    }
    const format = new GeoJSON({ dataProjection: 'EPSG:4326', featureProjection: this.#projection() });
    show(this.path, format.readFeatures(path));
  }
}

function show(layer: VectorLayer<VectorSource>, features: Feature[]): void {
  const source = layer.getSource();
  source?.clear(true);
  source?.addFeatures(features);
}

function linkFeature(pond: PondOnView): Feature[] {
  const line = linkLine(pond);
  if (line === null) return [];
  const geometry = new LineString(line.map(([x, y]) => [x, y]));
  return [new Feature({ geometry, pond: pond.id, reach: pond.reach })];
}

function pourPointFeature(pond: PondOnView): Feature[] {
  if (pond.pourPoint === null) return [];
  const geometry = new Point([...pond.pourPoint]);
  return [new Feature({ geometry, pond: pond.id, reach: pond.reach, bearing: overflowBearing(pond) })];
}
