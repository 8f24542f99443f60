import type OlMap from 'ol/Map.js';
import type { Json } from '../host/index.ts';
import type { SurveyLayers } from '../map/survey-layers.ts';
import type { UnitSystem } from './measures.ts';
import type { FoundPonds } from './ponds.ts';
import type { Engine, SurveyView } from './running.ts';
import { Running } from './running.ts';
import type { Tone } from './tone.ts';
import type { TracedPath } from './traced-path.ts';

/** What concerns the terrain among the inputs of every process. */
export type TerrainInputs = Readonly<{ terrain: readonly string[] } & Record<string, Json>>;

/** A terrain as surveyed. */
export interface Surveyed {
  readonly inputs: TerrainInputs;
  /** Names of its files, for people. */
  readonly names: readonly string[];
  readonly view: SurveyView;
  readonly notes: readonly string[];
}

/** A terrain whose file does not name its vertical unit. */
export interface WithoutUnit {
  readonly inputs: TerrainInputs;
  readonly names: readonly string[];
}

/** Something that went wrong, in words. */
export interface Fault {
  readonly id: number;
  readonly code: string;
  readonly message: string;
}

export interface SessionState {
  readonly lang: string;
  readonly units: UnitSystem;
  readonly tone: Tone;
  readonly map: OlMap | null;
  readonly layers: SurveyLayers | null;
  readonly surveyed: Surveyed | null;
  readonly withoutUnit: WithoutUnit | null;
  readonly ponds: FoundPonds | null;
  readonly selected: string | null;
  readonly path: TracedPath | null;
  /** The leg of the path that is pointed at. */
  readonly leg: number | null;
  /** The next click on the map is the start of a path. */
  readonly picking: boolean;
  readonly faults: readonly Fault[];
  /** Last thing worth telling, for the status line and screen readers. */
  readonly said: string;
}

/** Some of the session's state has changed. */
export class SessionChange extends Event {
  readonly keys: ReadonlySet<keyof SessionState>;

  constructor(keys: ReadonlySet<keyof SessionState>) {
    super('change');
    this.keys = keys;
  }
}

const nothing: SessionState = {
  lang: 'en',
  units: 'metric',
  tone: 'light',
  map: null,
  layers: null,
  surveyed: null,
  withoutUnit: null,
  ponds: null,
  selected: null,
  path: null,
  leg: null,
  picking: false,
  faults: [],
  said: '',
};

/** What the elements of one host share. Tells `change` when something of it is put anew. */
export class Session extends EventTarget {
  readonly running: Running;
  #state: SessionState = nothing;
  #lastFault = 0;
  /** Elements that list the path and can clear it. */
  readonly pathLists = new Set<{ readonly isConnected: boolean }>();

  /** @param openEngine called when the first question is asked */
  constructor(openEngine: () => Promise<Engine>) {
    super();
    this.running = new Running(openEngine);
  }

  get state(): SessionState {
    return this.#state;
  }

  put(news: Partial<SessionState>): void {
    const before = this.#state;
    const all = { ...news };
    // Where nothing lists the path, it goes with the pond: it could not be cleared otherwise.
    if (before.selected !== null && news.selected === null && !this.#hasPathList) {
      all.path = null;
      all.leg = null;
    }
    this.#state = { ...before, ...all };
    const keys = (Object.keys(all) as (keyof SessionState)[]).filter(
      (key) => before[key] !== this.#state[key],
    );
    if (keys.length > 0) this.dispatchEvent(new SessionChange(new Set(keys)));
  }

  get #hasPathList(): boolean {
    return [...this.pathLists].some(({ isConnected }) => isConnected);
  }

  /** Keeps an error for the status line; gives the number by which it is forgotten. */
  fault(code: string, message: string): number {
    const others = this.#state.faults.filter((fault) => fault.message !== message);
    const id = ++this.#lastFault;
    this.put({ faults: [...others, { id, code, message }] });
    return id;
  }

  forgetFault(id: number): void {
    this.put({ faults: this.#state.faults.filter((fault) => fault.id !== id) });
  }
}
