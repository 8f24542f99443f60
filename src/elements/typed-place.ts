import type Projection from 'ol/proj/Projection.js';
import { transform } from 'ol/proj.js';
import { fromCrs84, toCrs84 } from '../map/index.ts';
import { viewToTerrain } from '../map/projections.ts';
import { extentOf } from './fit-map.ts';
import type { SurveyView } from './running.ts';
import { pairText, typedPair } from './typed-pair.ts';

/** What a typed coordinate may be in. */
export type PlaceCrs = 'terrain' | 'view' | 'lonLat';

/** A place as processes take it. */
export interface AskedPlace {
  /** x,y with a point as decimal sign. */
  readonly from: string;
  /** Null = the terrain's CRS. */
  readonly crs: string | null;
}

/** The place that was typed; null when it is no coordinate, or has no place in the terrain's CRS. */
export function placeAsked(
  text: string,
  crs: PlaceCrs,
  view: Projection | null,
  survey: SurveyView,
  tag = 'en',
): AskedPlace | null {
  const typed = typedPair(text, tag);
  if (!typed) return null;
  if (crs === 'lonLat') return { from: typed.join(','), crs: 'EPSG:4326' };
  if (crs === 'terrain' || view === null) return { from: typed.join(','), crs: null };
  const [x, y] = viewToTerrain(view, survey.georeference.crs)(Number(typed[0]), Number(typed[1]));
  return Number.isFinite(x) && Number.isFinite(y) ? { from: `${x},${y}`, crs: null } : null;
}

/** Whether a place is certainly off the terrain; a longitude may be full turns away. */
export function isOutside({ from, crs }: AskedPlace, survey: SurveyView): boolean {
  const own = survey.georeference.crs;
  const [west, south, east, north] = extentOf(survey);
  const typed = from.split(',').map(Number);
  try {
    const [x, y] = crs === null ? typed : fromCrs84(own)(typed[0], typed[1]);
    const turns = own.kind === 'geographic' ? [-360, 0, 360] : [0];
    return !(y >= south && y <= north && turns.some((turn) => x + turn >= west && x + turn <= east));
  } catch {
    return true;
  }
}

/** Decimals that place a point to the centimetre: two of a length, seven of a degree. */
function placeDecimals({ georeference }: SurveyView): number {
  return georeference.crs.kind === 'projected' ? 2 : 7;
}

/** What a field shows for a picked place: the middle of its cell, since rounding the place could lead to the next one. */
export function pickedText(x: number, y: number, survey: SurveyView, tag: string): string {
  const { west, north, cellWidth, cellHeight } = survey.georeference;
  const middle = (along: number, count: number): number => Math.min(Math.floor(along), count - 1) + 0.5;
  const east = (x - west) / cellWidth;
  const south = (north - y) / cellHeight;
  return pairText(
    west + middle(east, east <= survey.width ? survey.width : Number.POSITIVE_INFINITY) * cellWidth,
    north - middle(south, survey.height) * cellHeight,
    placeDecimals(survey),
    tag,
  );
}

/** The middle of the terrain, as an example of what may be typed. */
export function placeExample(
  crs: PlaceCrs,
  view: Projection | null,
  survey: SurveyView,
  tag: string,
): string {
  const [west, south, east, north] = extentOf(survey);
  const middle = [(west + east) / 2, (south + north) / 2];
  const own = pairText(middle[0], middle[1], placeDecimals(survey), tag);
  if (crs === 'terrain' || (crs === 'view' && view === null)) return own;
  const [longitude, latitude] = toCrs84(survey.georeference.crs)(middle[0], middle[1]);
  if (crs === 'lonLat' || view === null) return pairText(longitude, latitude, 7, tag);
  const [x, y] = transform([longitude, latitude], 'EPSG:4326', view);
  return pairText(x, y, view.getUnits() === 'degrees' ? 7 : 2, tag);
}
