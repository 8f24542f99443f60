import { html, nothing, type TemplateResult } from 'lit';
import { extentOf } from './fit-map.ts';
import type { SurveyView } from './running.ts';
import type { Surveyed } from './session.ts';
import type { Voice } from './voice.ts';

/** What a terrain is, in words and figures. */
export function terrainFacts(
  { say, measures }: Voice,
  { view, names, notes }: Surveyed,
  unitChoice: TemplateResult,
): TemplateResult {
  const { width, height, georeference, voids, verticalDatum } = view;
  const { crs, cellWidth, cellHeight } = georeference;
  const isProjected = crs.kind === 'projected';
  const unitM = crs.unitM ?? 1;
  const side = (value: number): string =>
    isProjected ? measures.length(value * unitM) : `${measures.decimals(value, 7)}${say('degree')}`;
  const [west, south, east, north] = extentOf(view);
  const place = (value: number): string => measures.decimals(value, isProjected ? 2 : 6);
  const range = elevationRange(view);
  return html`
    <dl>
      <dt>${say('factFiles')}</dt>
      <dd>${names.join(', ')}</dd>
      <dt>${say('factSize')}</dt>
      <dd>
        ${say('factCells', { columns: width, rows: height, width: side(cellWidth), height: side(cellHeight) })}
      </dd>
      <dt>${say('factCrs')}</dt>
      <dd>${crs.name}${crs.epsg === null ? nothing : ` (EPSG:${crs.epsg})`}</dd>
      <dt>${say('factExtent')}</dt>
      <dd>
        ${say('factExtentValue', { west: place(west), east: place(east), south: place(south), north: place(north) })}
      </dd>
      <dt>${say('factElevation')}</dt>
      <dd>
        ${range === null ? '–' : say('factRange', { low: measures.elevation(range[0]), high: measures.elevation(range[1]) })}
      </dd>
      <dt>${say('factDatum')}</dt>
      <dd>${verticalDatum ?? say('factDatumUnknown')}</dd>
      <dt>${say('unit')}</dt>
      <dd>${unitChoice}</dd>
      <dt>${say('factVoids')}</dt>
      <dd>
        ${
          voids === 0
            ? say('factNoVoids')
            : say('factVoidCells', { count: voids, share: measures.share(voids / (width * height)) })
        }
      </dd>
    </dl>
    ${
      notes.length === 0
        ? nothing
        : html`
            <div class="stack">
              <h3>${say('notesTitle')}</h3>
              ${notes.map((note) => html`<p class="note">${note}</p>`)}
            </div>
          `
    }
  `;
}

const ranges = new WeakMap<SurveyView, readonly [number, number] | null>();

/** Lowest and highest ground, metres, found once for a view; null where all is void. */
function elevationRange(view: SurveyView): readonly [number, number] | null {
  const known = ranges.get(view);
  if (known !== undefined) return known;
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const z of view.elevationM) {
    if (z < low) low = z;
    if (z > high) high = z;
  }
  const range = low <= high ? ([low, high] as const) : null;
  ranges.set(view, range);
  return range;
}
