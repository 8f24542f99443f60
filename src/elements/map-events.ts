import type { ReactiveController, ReactiveElement } from 'lit';
import type OlMap from 'ol/Map.js';
import type MapBrowserEvent from 'ol/MapBrowserEvent.js';

type Pointed = (event: MapBrowserEvent) => void;

/** Hears clicks and pointer moves on whatever map is bound, while its element is on the page. */
export class MapEvents implements ReactiveController {
  readonly #heard: Readonly<Partial<Record<'click' | 'pointermove', Pointed>>>;
  #map: OlMap | null = null;
  #connected = false;
  #listening: OlMap | null = null;

  constructor(element: ReactiveElement, heard: Readonly<Partial<Record<'click' | 'pointermove', Pointed>>>) {
    this.#heard = heard;
    element.addController(this);
  }

  bind(map: OlMap | null): void {
    this.#map = map;
    this.#listen();
  }

  hostConnected(): void {
    this.#connected = true;
    this.#listen();
  }

  hostDisconnected(): void {
    this.#connected = false;
    this.#listen();
  }

  #listen(): void {
    const wanted = this.#connected ? this.#map : null;
    if (wanted === this.#listening) return;
    for (const type of ['click', 'pointermove'] as const) {
      const hear = this.#heard[type];
      if (!hear) continue;
      this.#listening?.un(type, hear);
      wanted?.on(type, hear);
    }
    this.#listening = wanted;
  }
}
