import Feature from 'ol/Feature.js';
import VectorLayer from 'ol/layer/Vector.js';
import type OlMap from 'ol/Map.js';
import VectorSource from 'ol/source/Vector.js';
import Stroke from 'ol/style/Stroke.js';
import Style from 'ol/style/Style.js';
import { css } from '../map/packed-colour.ts';
import { darkPalette, lightPalette, type Palette } from '../map/palette.ts';
import { SurveyLayers } from '../map/survey-layers.ts';
import type { Session, SessionState } from './session.ts';
import type { Tone } from './tone.ts';

/** The colours of the map for a page's tone. */
export function paletteOf(tone: Tone): Palette {
  return tone === 'dark' ? darkPalette : lightPalette;
}

/**
 * Draws what a session knows on a map, and follows it. The result takes everything off again.
 * @throws OverbrimError `bad-input` when the map is none of our OpenLayers.
 */
export function drawOn(map: OlMap, session: Session): () => void {
  const layers = new SurveyLayers(map, paletteOf(session.state.tone));
  const pointedLeg = new VectorLayer({ source: new VectorSource() });
  layers.group.getLayers().insertAt(layers.group.getLayers().getArray().indexOf(layers.path), pointedLeg);
  const draw = (has: (key: keyof SessionState) => boolean): void => {
    const { surveyed, ponds, selected, path, tone } = session.state;
    if (has('tone')) {
      layers.setPalette(paletteOf(tone));
      pointedLeg.setStyle(pointedStyle(paletteOf(tone)));
    }
    if (has('surveyed')) {
      layers.setSurvey(surveyed?.view);
      tellProblem();
    }
    if (has('ponds') && ponds) layers.setPonds(ponds.outlines, ponds.pourPoints);
    if (has('selected') || has('ponds')) layers.select(selected);
    if (has('path')) layers.setPath(path?.lines);
    if (has('path') || has('leg')) drawLeg();
    map.getTargetElement()?.style.setProperty('cursor', session.state.picking ? 'crosshair' : '');
  };
  let problemTold: number | undefined;
  const tellProblem = (): void => {
    const { problem } = layers;
    if (problemTold !== undefined) session.forgetFault(problemTold);
    problemTold = problem ? session.fault(problem.code, problem.message) : undefined;
  };
  const drawLeg = (): void => {
    const source = pointedLeg.getSource();
    source?.clear(true);
    for (const leg of layers.path.getSource()?.getFeatures() ?? []) {
      if (leg.get('leg') === session.state.leg) source?.addFeature(new Feature(leg.getGeometry()));
    }
  };
  const onChange = (event: Event): void => draw((key) => Reflect.get(event, 'keys').has(key));
  const onView = (): void => {
    tellProblem();
    drawLeg();
  };
  draw(() => true);
  session.addEventListener('change', onChange);
  map.on('change:view', onView);
  session.put({ map, layers });
  return () => {
    session.removeEventListener('change', onChange);
    map.un('change:view', onView);
    map.getTargetElement()?.style.removeProperty('cursor');
    layers.remove();
    session.put({ map: null, layers: null });
  };
}

/** A broad band under the leg that is pointed at, so that its own line stays readable. */
function pointedStyle({ accent }: Palette): Style {
  return new Style({ stroke: new Stroke({ color: css(accent, 0.35), width: 16, lineCap: 'round' }) });
}
