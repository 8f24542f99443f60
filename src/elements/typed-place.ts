import type Projection from 'ol/proj/Projection.js';
import { viewToTerrain } from '../map/projections.ts';
import type { SurveyView } from './running.ts';

/** What a typed coordinate may be in. */
export type PlaceCrs = 'terrain' | 'view' | 'lonLat';

/** A place as processes take it. */
export interface AskedPlace {
  /** x,y with a point as decimal sign. */
  readonly from: string;
  /** Null = the terrain's CRS. */
  readonly crs: string | null;
}

const number = '[+-]?(?:\\d+\\.?\\d*|\\.\\d+)(?:[eE][+-]?\\d+)?';
const pair = new RegExp(`^\\s*(${number})\\s*[,;\\s]\\s*(${number})\\s*$`);

/** The place that was typed; null when it is no coordinate, or has no place in the terrain's CRS. */
export function placeAsked(
  text: string,
  crs: PlaceCrs,
  view: Projection | null,
  survey: SurveyView,
): AskedPlace | null {
  const match = pair.exec(text);
  if (!match) return null;
  if (crs === 'lonLat') return { from: `${match[1]},${match[2]}`, crs: 'EPSG:4326' };
  if (crs === 'terrain' || view === null) return { from: `${match[1]},${match[2]}`, crs: null };
  const [x, y] = viewToTerrain(view, survey.georeference.crs)(Number(match[1]), Number(match[2]));
  return Number.isFinite(x) && Number.isFinite(y) ? { from: `${x},${y}`, crs: null } : null;
}
