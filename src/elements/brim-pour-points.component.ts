import { html, nothing, type PropertyDeclarations, type PropertyValues } from 'lit';
import { Card } from './card.ts';
import { BrimPondsEvent } from './events/brim-ponds-event.ts';
import { BrimSelectEvent } from './events/brim-select-event.ts';
import { fitExtent } from './fit-map.ts';
import { type LeastProblems, leastSizes, leastSizesLook } from './least-sizes.ts';
import { MapEvents } from './map-events.ts';
import { pitOf } from './pit-of.ts';
import { pondDetail } from './pond-detail.ts';
import { pageWith, pondList, pondListLook, pondsAPage } from './pond-list.ts';
import type { Pond } from './ponds.ts';
import { findPonds, type LeastSizes, refuse, tracePath } from './questions.ts';
import type { Session, SessionChange } from './session.ts';

const thresholds = [
  ['minDepth', 'min-depth'],
  ['minArea', 'min-area'],
  ['minCapacity', 'min-capacity'],
] as const;

/** Without the attribute it is the default; what is no number stays none, to be told. */
const leastOr = (standard: number) => ({
  fromAttribute: (text: string | null) =>
    text === null ? standard : text.trim() === '' ? Number.NaN : Number(text),
});

/**
 * Finds the ponds of the terrain, lists them, and shows of the selected one where and at which level it overflows and
 * which pond it reaches next. On the map: shores, pour points with the way of the overflow, links.
 *
 * @element brim-pour-points
 * @attr min-depth - Least depth at brim of ponds to show, metres. Default 0.1, about the error of lidar elevations.
 * @attr min-area - Least water surface, square metres. Default 0.
 * @attr min-capacity - Least capacity, cubic metres. Default 0.
 * @attr host - Id of a brim-host elsewhere on the page.
 * @fires {BrimPondsEvent} brim-ponds - Ponds are found.
 * @fires {BrimSelectEvent} brim-select - A pond is about to be selected; prevent it to veto.
 * @slot - More content at the end of the card.
 * @csspart card - The card.
 * @csspart heading - Its heading.
 * @csspart list - The list of ponds.
 * @csspart detail - What is known of the selected pond.
 */
export class BrimPourPoints extends Card {
  static override styles = [...Card.looks, leastSizesLook, pondListLook];
  static override properties: PropertyDeclarations = {
    minDepth: { attribute: 'min-depth', converter: leastOr(0.1) },
    minArea: { attribute: 'min-area', converter: leastOr(0) },
    minCapacity: { attribute: 'min-capacity', converter: leastOr(0) },
    page: { state: true },
    problems: { state: true },
  };

  declare minDepth: number;
  declare minArea: number;
  declare minCapacity: number;
  declare protected page: number;
  declare protected problems: LeastProblems;
  readonly #mapEvents = new MapEvents(this, { click: (event) => this.#clicked(event.coordinate) });

  constructor() {
    super();
    this.minDepth = 0.1;
    this.minArea = 0;
    this.minCapacity = 0;
    this.page = 0;
    this.problems = {};
  }

  /** Selects a pond by its id, or none; false when a listener vetoed. */
  select(id: string | null): boolean {
    const { session } = this;
    if (!session || session.state.selected === id) return true;
    if (!this.dispatchEvent(new BrimSelectEvent(id))) return false;
    const pond = id === null ? undefined : session.state.ponds?.byId.get(id);
    session.put({ selected: pond?.id ?? null, ...(pond ? { said: this.#selectedWords(pond) } : {}) });
    return true;
  }

  override sessionChanged(session: Session, change: SessionChange | undefined): void {
    super.sessionChanged(session, change);
    const { map, ponds, selected, surveyed } = session.state;
    if (!change || change.keys.has('map')) this.#mapEvents.bind(map);
    if (surveyed && (!change || change.keys.has('surveyed'))) this.#find();
    if (change?.keys.has('ponds')) {
      this.page = 0;
      if (ponds) this.dispatchEvent(new BrimPondsEvent(ponds));
    }
    const pond = selected === null ? undefined : ponds?.byId.get(selected);
    if (pond && change?.keys.has('selected')) this.page = pageWith(pond);
  }

  protected override willUpdate(changed: PropertyValues): void {
    if (this.hasUpdated && thresholds.some(([name]) => changed.has(name)) && this.state?.surveyed)
      this.#find();
  }

  protected override render(): unknown {
    const { voice } = this;
    return this.card(voice.say('pondsHeading'), this.state?.surveyed ? this.#content() : this.#waiting());
  }

  #waiting(): unknown {
    return html`<p part="hint" class="hint">${this.voice.say('needsTerrain')}</p>`;
  }

  #content(): unknown {
    const { voice, state } = this;
    const { measures } = voice;
    const ponds = state?.ponds;
    const filters = leastSizes(voice, {
      least: this.#least(),
      problems: this.problems,
      onChange: (least, problems) => {
        this.problems = problems;
        this.minDepth = least.depthM;
        this.minArea = least.areaM2;
        this.minCapacity = least.capacityM3;
      },
    });
    if (!ponds) return filters;
    if (ponds.all === 0) return html`<p>${voice.say('noPondsAtAll')}</p>`;
    const selected = state.selected === null ? undefined : ponds.byId.get(state.selected);
    const from = this.page * pondsAPage;
    return html`
      <p class="lead">
        ${voice.say('pondsFound', {
          count: ponds.list.length,
          all: measures.count(ponds.all),
          capacity: measures.volume(ponds.capacityM3),
        })}
        ${voice.say('pondsArea', { area: measures.area(ponds.areaM2) })}
      </p>
      ${filters}
      ${
        ponds.list.length === 0
          ? html`<p class="hint">${voice.say('noPonds')}</p>`
          : pondList(voice, {
              ponds: ponds.list.slice(from, from + pondsAPage),
              from,
              count: ponds.list.length,
              selected: selected?.id ?? null,
              onSelect: (id) => this.#selectInList(id),
              onPage: (step) => {
                this.page += step;
              },
            })
      }
      ${
        selected
          ? pondDetail(voice, {
              pond: selected,
              next: selected.spillsInto === null ? null : (ponds.byId.get(selected.spillsInto) ?? null),
              onSelect: (id) => this.#selectInList(id),
              onShow: state.layers ? () => this.#show(selected, true) : null,
              onTrace: () => this.#trace(selected),
            })
          : ponds.list.length > 0
            ? html`<p class="hint">${voice.say('pondNoneSelected')}</p>`
            : nothing
      }
    `;
  }

  #least(): LeastSizes {
    return { depthM: this.minDepth, areaM2: this.minArea, capacityM3: this.minCapacity };
  }

  #find(): void {
    const { session } = this;
    if (!session) return;
    const wrong = thresholds.find(([name]) => !(this[name] >= 0 && this[name] < Number.POSITIVE_INFINITY));
    if (!wrong) {
      void findPonds(session, this.#least());
      return;
    }
    const [property, name] = wrong;
    const value = Number.isNaN(this[property]) ? this.getAttribute(name) : null;
    const values = { name, value: value ?? String(this[property]) };
    refuse(session, 'ponds', 'bad-input', this.voice.say('badLeast', values));
  }

  #selectInList(id: string): void {
    if (!this.select(id)) return;
    const pond = this.state?.ponds?.byId.get(id);
    if (pond) this.#show(pond, false);
  }

  /** Brings a pond into sight; unless asked to, a view that shows it already stays as it is. */
  #show(pond: Pond, isAsked: boolean): void {
    const layers = this.state?.layers;
    const extent = layers?.ponds.get(pond.id)?.outline.getGeometry()?.getExtent();
    if (!layers || !extent) return;
    const [west, south, east, north] = layers.map.getView().calculateExtent(layers.map.getSize());
    const isInSight = extent[0] >= west && extent[1] >= south && extent[2] <= east && extent[3] <= north;
    if (isAsked || !isInSight) fitExtent(layers.map, padded(extent));
  }

  #trace(pond: Pond): void {
    const { session } = this;
    const view = session?.state.surveyed?.view;
    const pit = view && pitOf(view, pond.id);
    if (session && pit) void tracePath(session, pit.join(','));
  }

  #clicked(coordinate: readonly number[]): void {
    const { state, session } = this;
    if (!session || !state?.layers || !state.ponds || state.picking) return;
    const id = state.layers.readOut(coordinate)?.pond ?? null;
    if (id !== null && !state.ponds.byId.has(id)) session.put({ said: this.voice.say('pondLeftOut') });
    this.select(id !== null && state.ponds.byId.has(id) ? id : null);
  }

  #selectedWords({ number, spillElevationM }: Pond): string {
    const level = this.voice.measures.elevation(spillElevationM);
    return this.voice.say('pondSelected', { number, level });
  }
}

/** An extent with half its size of room around, so that a pond is seen in its surroundings. */
function padded([west, south, east, north]: number[]): number[] {
  const room = Math.max(east - west, north - south) / 2;
  return [west - room, south - room, east + room, north + room];
}

declare global {
  interface HTMLElementTagNameMap {
    'brim-pour-points': BrimPourPoints;
  }
}
