import { html, nothing, type TemplateResult } from 'lit';
import type { Pond } from './ponds.ts';
import type { Voice } from './voice.ts';

interface PondDetail {
  readonly pond: Pond;
  /** The pond that its overflow reaches, null at an outlet. */
  readonly next: Pond | null;
  readonly onSelect: (id: string) => void;
  /** Null without a map. */
  readonly onShow: (() => void) | null;
  readonly onTrace: () => void;
}

/** Of one pond: where and at which level it overflows, which pond is next, how much it holds, how sure that is. */
export function pondDetail(
  { say, measures }: Voice,
  { pond, next, onSelect, onShow, onTrace }: PondDetail,
): TemplateResult {
  const [longitude, latitude] = pond.pourPoint ?? [];
  return html`
    <div part="detail" class="stack">
      <h3>${say('pondNumber', { number: pond.number })}</h3>
      <dl>
        <dt>${say('overflowsAt')}</dt>
        <dd>
          <b>${measures.elevation(pond.spillElevationM)}</b>,
          ${say('overflowsWhy', { depth: measures.depth(pond.depthM) })}
        </dd>
        ${
          longitude === undefined || latitude === undefined
            ? nothing
            : html`
                <dt>${say('pourPointAt')}</dt>
                <dd>
                  ${say('lonLat', {
                    longitude: measures.decimals(longitude, 6),
                    latitude: measures.decimals(latitude, 6),
                  })}
                </dd>
              `
        }
        <dt>${say('reachesNext')}</dt>
        <dd>
          ${
            next
              ? html`<button type="button" class="plain" @click=${() => onSelect(next.id)}>
                  ${say('pondNumber', { number: next.number })}
                </button>`
              : say('reachesOutlet')
          }
        </dd>
        <dt>${say('holds')}</dt>
        <dd>${measures.volume(pond.capacityM3)}</dd>
        <dt>${say('surface')}</dt>
        <dd>${measures.area(pond.areaM2)}</dd>
        <dt>${say('catchment')}</dt>
        <dd>${measures.area(pond.catchmentAreaM2)}</dd>
        <dt>${say('contributing')}</dt>
        <dd>${measures.area(pond.contributingAreaM2)}</dd>
        <dt>${say('identifier')}</dt>
        <dd>${pond.id}</dd>
      </dl>
      ${pond.touchesEdge ? html`<p class="note">${say('edgeCaution')}</p>` : nothing}
      ${pond.heldByOutlet ? html`<p class="note">${say('heldCaution')}</p>` : nothing}
      <div class="row">
        <button type="button" class="main" @click=${onTrace}>${say('traceOverflow')}</button>
        ${onShow ? html`<button type="button" @click=${onShow}>${say('showOnMap')}</button>` : nothing}
      </div>
    </div>
  `;
}
