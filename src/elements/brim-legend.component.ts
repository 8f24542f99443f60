import { html, nothing, type PropertyDeclarations, type TemplateResult } from 'lit';
import type BaseLayer from 'ol/layer/Base.js';
import { css as rgb } from '../map/packed-colour.ts';
import type { ReadOut } from '../map/read-out.ts';
import type { SurveyLayers } from '../map/survey-layers.ts';
import { Card } from './card.ts';
import { depthLabel } from './depth-label.ts';
import { paletteOf } from './drawing.ts';
import { legendLook, swatch } from './legend-swatches.ts';
import { MapEvents } from './map-events.ts';
import type { MessageKey } from './messages.ts';
import type { Session, SessionChange } from './session.ts';

/**
 * What the map shows, in words and swatches, each part with a switch; ground and water under the pointer.
 *
 * @element brim-legend
 * @attr host - Id of a brim-host elsewhere on the page.
 * @slot - More content at the end of the card.
 * @csspart card - The card.
 * @csspart heading - Its heading.
 * @csspart read-out - Ground and water under the pointer.
 */
export class BrimLegend extends Card {
  static override styles = [...Card.looks, legendLook];
  static override properties: PropertyDeclarations = { place: { state: true } };

  /** What lies under the pointer. */
  declare protected place: ReadOut | null;
  readonly #mapEvents = new MapEvents(this, {
    pointermove: (event) => {
      if (!event.dragging) this.place = this.state?.layers?.readOut(event.coordinate) ?? null;
    },
    click: (event) => {
      this.place = this.state?.layers?.readOut(event.coordinate) ?? null;
    },
  });

  constructor() {
    super();
    this.place = null;
  }

  override sessionChanged(session: Session, change: SessionChange | undefined): void {
    super.sessionChanged(session, change);
    if (!change || change.keys.has('map')) this.#mapEvents.bind(session.state.map);
    if (change?.keys.has('surveyed')) this.place = null;
  }

  protected override render(): unknown {
    const { voice, state } = this;
    const layers = state?.layers;
    return this.card(
      voice.say('legendHeading'),
      state?.surveyed && layers
        ? this.#legend(layers)
        : html`<p part="hint" class="hint">${voice.say('needsTerrain')}</p>`,
    );
  }

  #legend(layers: SurveyLayers): unknown {
    const { voice, state } = this;
    const palette = paletteOf(state?.tone ?? 'light');
    const { ponds, path } = state ?? {};
    const row = (mark: unknown, text: string): unknown => html`<li>${mark}<span>${text}</span></li>`;
    const depths = palette.depths.map(({ colour }, i) =>
      row(swatch.area(rgb(colour), rgb(palette.shore)), depthLabel(voice, palette.depths, i)),
    );
    return html`
      <p part="read-out" class="read-out">
        <span class="label">${voice.say('readOut')}</span><br />${this.#readOut()}
      </p>
      ${this.#part('legendWater', [layers.wet], depths)}
      ${this.#part('legendRelief', [layers.relief], [], swatch.relief(rgb(palette.lit), rgb(palette.shadow)))}
      ${
        ponds
          ? this.#part(
              'legendPonds',
              [layers.outlines, layers.pourPoints, layers.links, layers.selection],
              [
                row(swatch.line(rgb(palette.shore), 1.5), voice.say('legendShore')),
                row(swatch.pourPoint(rgb(palette.accent), rgb(palette.halo)), voice.say('legendPour')),
                row(swatch.line(rgb(palette.accent), 1.25), voice.say('legendLink')),
                row(swatch.line(rgb(palette.accent), 4), voice.say('legendSelected')),
              ],
            )
          : nothing
      }
      ${
        path
          ? this.#part(
              'legendPath',
              [layers.path],
              [
                row(swatch.start(rgb(palette.accent), rgb(palette.halo)), voice.say('legendStart')),
                row(swatch.line(rgb(palette.accent), 3), voice.say('legendLand')),
                row(swatch.line(rgb(palette.accent), 3, '9 6'), voice.say('legendThrough')),
                path.endsAt === 'outlet'
                  ? row(swatch.arrow(rgb(palette.accent), rgb(palette.halo)), voice.say('legendOutlet'))
                  : row(swatch.cross(rgb(palette.accent)), voice.say('legendNoWay')),
              ],
            )
          : nothing
      }
    `;
  }

  /** Rows under a heading that switches their layers; without rows the heading has a mark of its own. */
  #part(
    key: MessageKey,
    layers: readonly BaseLayer[],
    rows: readonly unknown[],
    mark: unknown = nothing,
  ): TemplateResult {
    const title = this.voice.say(key);
    const change = ({ currentTarget }: Event): void => {
      for (const layer of layers) layer.setVisible((currentTarget as HTMLInputElement).checked);
      this.requestUpdate();
    };
    return html`
      <div class="part">
        <h3>
          <label>
            <input
              type="checkbox"
              .checked=${layers.some((layer) => layer.getVisible())}
              aria-label=${this.voice.say('show', { what: title })}
              @change=${change}
            />
            ${mark}<span>${title}</span>
          </label>
        </h3>
        ${rows.length === 0 ? nothing : html`<ul>${rows}</ul>`}
      </div>
    `;
  }

  #readOut(): string {
    const { say, measures } = this.voice;
    const { place } = this;
    if (!place) return say('readOutNothing');
    if (place.groundM === null) return say('readOutVoid');
    const ground = measures.elevation(place.groundM);
    if (place.waterM === null || place.depthM === null) return say('readOutDry', { ground });
    return say('readOutWet', {
      ground,
      water: measures.elevation(place.waterM),
      depth: measures.depth(place.depthM),
    });
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'brim-legend': BrimLegend;
  }
}
