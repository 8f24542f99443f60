import { html, nothing, type PropertyDeclarations } from 'lit';
import { createRef } from 'lit/directives/ref.js';
import { Card } from './card.ts';
import { BrimPathEvent } from './events/brim-path-event.ts';
import { fitExtent } from './fit-map.ts';
import { legList, legListLook } from './leg-list.ts';
import { MapEvents } from './map-events.ts';
import { pitOf } from './pit-of.ts';
import { placeForm } from './place-form.ts';
import { tracePath } from './questions.ts';
import type { Session, SessionChange } from './session.ts';
import {
  type AskedPlace,
  isOutside,
  type PlaceCrs,
  pickedText,
  placeAsked,
  placeExample,
} from './typed-place.ts';

/**
 * Traces the way of the overflow from a place picked on the map, from the selected pond, or from a typed coordinate,
 * and lists it leg by leg.
 *
 * @element brim-spill-path
 * @attr host - Id of a brim-host elsewhere on the page.
 * @fires {BrimPathEvent} brim-path - A spill path is traced.
 * @slot - More content at the end of the card.
 * @csspart card - The card.
 * @csspart heading - Its heading.
 * @csspart legs - The legs of the path.
 */
export class BrimSpillPath extends Card {
  static override styles = [...Card.looks, legListLook];
  static override properties: PropertyDeclarations = {
    crs: { state: true },
    problem: { state: true },
    showsAll: { state: true },
  };

  /** What the typed coordinate is in. */
  declare protected crs: PlaceCrs;
  /** What is wrong with what was typed. */
  declare protected problem: string;
  declare protected showsAll: boolean;
  #listedFor: Session | undefined;
  readonly #typed = createRef<HTMLInputElement>();
  readonly #mapEvents = new MapEvents(this, {
    click: (event) => this.#clicked(event.coordinate),
    pointermove: (event) => this.#pointed(event.pixel),
  });

  constructor() {
    super();
    this.crs = 'terrain';
    this.problem = '';
    this.showsAll = false;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    document.addEventListener('keydown', this.#onKey);
  }

  override disconnectedCallback(): void {
    document.removeEventListener('keydown', this.#onKey);
    this.session?.put({ picking: false });
    super.disconnectedCallback();
  }

  /** Escape ends the picking wherever the focus is: it is mostly on the map then. */
  readonly #onKey = ({ key }: KeyboardEvent): void => {
    if (key === 'Escape' && this.state?.picking) this.session?.put({ picking: false });
  };

  override sessionChanged(session: Session, change: SessionChange | undefined): void {
    super.sessionChanged(session, change);
    if (!change) {
      this.#listedFor?.pathLists.delete(this);
      this.#listedFor = session;
      session.pathLists.add(this);
    }
    if (!change || change.keys.has('map')) this.#mapEvents.bind(session.state.map);
    if (change?.keys.has('path')) {
      this.showsAll = false;
      if (session.state.path) this.dispatchEvent(new BrimPathEvent(session.state.path));
    }
  }

  protected override render(): unknown {
    const { voice, state } = this;
    return this.card(
      voice.say('pathHeading'),
      state?.surveyed
        ? html`${this.#starts()} ${this.#path()}`
        : html`<p part="hint" class="hint">${voice.say('needsTerrain')}</p>`,
    );
  }

  #starts(): unknown {
    const { voice, session, state } = this;
    if (!session || !state?.surveyed) return nothing;
    const { picking, selected, ponds, map, layers, surveyed } = state;
    const pond = selected === null ? undefined : ponds?.byId.get(selected);
    return html`
      <p part="hint" class="hint">${voice.say('pathHint')}</p>
      <div class="row screen-only">
        ${
          map
            ? html`<button
                type="button"
                aria-pressed=${picking}
                @click=${() => session.put({ picking: !picking })}
              >
                ${voice.say(picking ? 'picking' : 'pickOnMap')}
              </button>`
            : nothing
        }
        <button
          type="button"
          ?disabled=${!pond}
          @click=${() => pond && this.#fromPond(pond.id)}
        >
          ${pond ? voice.say('fromPond', { number: pond.number }) : voice.say('fromNoPond')}
        </button>
      </div>
      ${placeForm(voice, {
        crs: this.crs,
        terrainName: surveyed.view.georeference.crs.name,
        viewCode: layers?.problem ? null : (map?.getView().getProjection().getCode() ?? null),
        problem: this.problem,
        field: this.#typed,
        onCrs: (crs) => {
          this.crs = crs;
          this.problem = '';
        },
        onTrace: (text) => this.#typedPlace(text),
      })}
    `;
  }

  #path(): unknown {
    const { voice, session, state } = this;
    if (!session || !state?.path) return nothing;
    return legList(voice, {
      path: state.path,
      leg: state.leg,
      showsAll: this.showsAll,
      numberOf: (pond) => state.ponds?.byId.get(pond)?.number ?? null,
      onPoint: (leg) => session.put({ leg }),
      onShow: (leg) => this.#show(leg),
      onAll: () => {
        this.showsAll = true;
      },
      onClear: () => session.put({ path: null, leg: null }),
    });
  }

  #fromPond(pond: string): void {
    const view = this.state?.surveyed?.view;
    const pit = view && pitOf(view, pond);
    if (pit) this.#ask({ from: pit.join(','), crs: null });
  }

  #ask({ from, crs }: AskedPlace): void {
    const { session } = this;
    this.problem = '';
    if (session) void tracePath(session, from, crs ?? undefined);
  }

  #typedPlace(text: string): void {
    const { session, state, voice } = this;
    if (!session || !state?.surveyed) return;
    const view = state.layers?.problem ? null : (state.map?.getView().getProjection() ?? null);
    const asked = placeAsked(text, this.crs, view, state.surveyed.view, voice.measures.lang);
    if (asked && !isOutside(asked, state.surveyed.view)) this.#ask(asked);
    else {
      const example = placeExample(this.crs, view, state.surveyed.view, voice.measures.lang);
      this.problem = voice.say(asked ? 'outsideTerrain' : 'badPlace', { value: text, example });
      this.#typed.value?.focus();
    }
  }

  #clicked(coordinate: readonly number[]): void {
    const { session, state } = this;
    if (!session || !state?.picking || !state.layers || !state.surveyed) return;
    const place = state.layers.readOut(coordinate);
    if (!place || place.groundM === null) {
      session.put({ said: this.voice.say('noCellHere') });
      return;
    }
    // The pond list hears the same click; it may be selected only when the mode is over.
    setTimeout(() => session.put({ picking: false }), 0);
    const from = `${place.x},${place.y}`;
    this.crs = 'terrain';
    const field = this.#typed.value;
    if (field) {
      field.value = pickedText(place.x, place.y, state.surveyed.view, this.voice.measures.lang);
    }
    this.#ask({ from, crs: null });
  }

  /** The leg under the pointer is marked in the list. */
  #pointed(pixel: number[]): void {
    const { session, state } = this;
    if (!session || !state?.layers || !state.path) return;
    const { map, path } = state.layers;
    let leg: number | null = null;
    map.forEachFeatureAtPixel(
      pixel,
      (feature) => {
        leg = feature.get('leg') ?? null;
        return leg !== null;
      },
      { layerFilter: (layer) => layer === path, hitTolerance: 4 },
    );
    session.put({ leg });
  }

  #show(leg: number): void {
    const layers = this.state?.layers;
    const features = layers?.path.getSource()?.getFeatures() ?? [];
    const extent = features
      .find((feature) => feature.get('leg') === leg)
      ?.getGeometry()
      ?.getExtent();
    if (layers && extent) fitExtent(layers.map, extent, layers.map.getView().getResolutionForZoom(19));
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'brim-spill-path': BrimSpillPath;
  }
}
