import { ContextProvider } from '@lit/context';
import { css, html, LitElement, nothing, type PropertyDeclarations, type PropertyValues } from 'lit';
import { type EngineClient, openEngine } from '../engine/client.ts';
import { drawOn } from './drawing.ts';
import { BrimErrorEvent } from './events/brim-error-event.ts';
import { findMap } from './find-map.ts';
import { look } from './look.ts';
import type { UnitSystem } from './measures.ts';
import type { Engine } from './running.ts';
import { Session, type SessionChange } from './session.ts';
import { hostConnected, sessionContext } from './session-link.ts';
import { statusLine, statusLook } from './status-line.ts';
import { toneAround, watchTone } from './tone.ts';
import { Voice } from './voice.ts';
import { words } from './words.ts';

/** How often a map that is not there yet is looked for, milliseconds, how long before that is told, how often then. */
const lookMs = 200;
const patienceMs = 3000;
const rareLookMs = 1000;
/** Between two looks at the clock while something runs, milliseconds. */
const tickMs = 500;

/**
 * Binds a map, the engine, the units and the language, and provides them to the elements inside it and to those that
 * name it by `host="id"`. Shows a status line: progress with Cancel, errors, what was done last, the caution.
 *
 * @element brim-host
 * @attr map - Name of a global variable that holds the OpenLayers map; as a property the map itself.
 * @attr for - Id of an element with a property `map`.
 * @attr worker-url - Address of overbrim-worker.js where it does not lie beside the script.
 * @attr {'metric' | 'us'} units - System of units.
 * @attr lang - Language of labels and numbers; without it that of the page.
 * @attr without-caution - Leaves the caution out of the status line, for pages that show it elsewhere.
 * @fires {BrimErrorEvent} brim-error - Something went wrong; prevent it to show the message elsewhere.
 * @slot - Elements that work with this host.
 * @csspart status - The status line.
 * @csspart job - A running job in it.
 * @csspart fault - An error in it.
 * @csspart said - What was done last.
 * @csspart caution - The caution.
 * @cssproperty --brim-ink - Text.
 * @cssproperty --brim-relief-blend - How the relief lies on the map beneath it, on the map or above it; `normal` covers it.
 * @cssproperty --brim-paper - Ground of cards.
 * @cssproperty --brim-accent - Buttons, focus, marks.
 */
export class BrimHost extends LitElement {
  static override styles = [look, statusLook, css`:host { display: block; }`];
  static override properties: PropertyDeclarations = {
    map: {},
    for: { type: String },
    workerUrl: { type: String, attribute: 'worker-url' },
    units: { type: String },
    lang: { type: String },
    withoutCaution: { type: Boolean, attribute: 'without-caution' },
    engine: { attribute: false },
  };

  declare map: unknown;
  declare for: string | null;
  declare workerUrl: string | null;
  declare units: UnitSystem;
  declare withoutCaution: boolean;
  /** An engine to share with others; without it the host opens one at the first question. */
  declare engine: Engine | null;

  readonly session = new Session(async () => this.engine ?? (await this.#opened()));
  #endDrawing: (() => void) | undefined;
  #drawnMap: unknown;
  #mapFault: number | undefined;
  #own: Promise<EngineClient> | undefined;
  #endWatch: (() => void) | undefined;
  #lookingSince = 0;
  #nextLook: ReturnType<typeof setTimeout> | undefined;
  #tick: ReturnType<typeof setInterval> | undefined;
  #told = new Set<number>();

  constructor() {
    super();
    this.map = null;
    this.for = null;
    this.workerUrl = null;
    this.units = 'metric';
    this.withoutCaution = false;
    this.engine = null;
    new ContextProvider(this, { context: sessionContext, initialValue: this.session });
    this.session.addEventListener('change', (event) => this.#changed(event as SessionChange));
    this.session.running.addEventListener('change', () => this.#runs());
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.dispatchEvent(new Event(hostConnected, { bubbles: true, composed: true }));
    this.#look();
    this.#endWatch = watchTone(() => this.session.put({ tone: toneAround(this) }));
    this.session.put({ tone: toneAround(this), lang: this.#language() });
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.#nextLook);
    clearInterval(this.#tick);
    this.#tick = undefined;
    this.#endWatch?.();
    // A host that is only moved on the page is back at once, and keeps all it has.
    queueMicrotask(() => {
      if (!this.isConnected) this.#leave();
    });
  }

  /** Frees the map and the engine; a host that comes back opens another. */
  #leave(): void {
    this.#unbind();
    this.session.running.leave();
    // A place where it cannot run has been told; an engine that others share is theirs to close.
    this.#own?.then((engine) => engine.close()).catch(() => {});
    this.#own = undefined;
    document.dispatchEvent(new Event(hostConnected));
  }

  protected override willUpdate(changed: PropertyValues): void {
    if (changed.has('units')) this.session.put({ units: this.units === 'us' ? 'us' : 'metric' });
    if (changed.has('lang')) this.session.put({ lang: this.#language() });
    if (changed.has('map') || changed.has('for')) this.#look();
  }

  protected override render(): unknown {
    const { state, running } = this.session;
    const voice = new Voice(state.lang, state.units);
    return html`
      <slot></slot>
      <section part="status" class="card status ${state.tone}" aria-label=${voice.say('status')} lang=${state.lang}>
        ${statusLine(voice, state, running.jobs, (id) => this.session.forgetFault(id))}
      </section>
      ${
        this.withoutCaution
          ? nothing
          : html`<p part="caution" class="card caution small ${state.tone}" lang=${state.lang}>
              <b>${voice.say('cautionTitle')}.</b> ${voice.say('caution')}
            </p>`
      }
    `;
  }

  #language(): string {
    return this.lang || this.closest('[lang]')?.getAttribute('lang') || 'en';
  }

  /** Looks for the map until it is there: pages often make it after their elements. */
  #look(): void {
    this.#withdraw();
    this.#lookingSince = Date.now();
    this.#lookAgain();
  }

  #lookAgain(): void {
    clearTimeout(this.#nextLook);
    if (!this.isConnected) return;
    try {
      const found = findMap(this.map, this.for, this.getRootNode() as Document | ShadowRoot);
      if ('map' in found) {
        this.#withdraw();
        if (found.map === this.#drawnMap) return;
        this.#unbind();
        this.#drawnMap = found.map;
        this.#endDrawing = drawOn(found.map, this.session);
        return;
      }
      this.#unbind();
      const waitedMs = Date.now() - this.#lookingSince;
      const isLate = waitedMs >= patienceMs;
      if (isLate && this.#mapFault === undefined) {
        const sentence = words(this.#language(), found.missing, found.values);
        this.#mapFault = this.session.fault('bad-input', sentence);
      }
      this.#nextLook = setTimeout(() => this.#lookAgain(), isLate ? rareLookMs : lookMs);
    } catch (error) {
      this.#unbind();
      this.#withdraw();
      this.#mapFault = this.session.fault(
        'bad-input',
        error instanceof Error ? error.message : String(error),
      );
    }
  }

  /** Takes back what was told of the map. */
  #withdraw(): void {
    if (this.#mapFault !== undefined) this.session.forgetFault(this.#mapFault);
    this.#mapFault = undefined;
  }

  #unbind(): void {
    this.#endDrawing?.();
    this.#endDrawing = undefined;
    this.#drawnMap = undefined;
  }

  #changed({ keys }: SessionChange): void {
    this.requestUpdate();
    if (!keys.has('faults')) return;
    for (const { id, code, message } of this.session.state.faults) {
      if (this.#told.has(id)) continue;
      this.#told.add(id);
      if (!this.dispatchEvent(new BrimErrorEvent(code, message))) this.session.forgetFault(id);
    }
  }

  #runs(): void {
    this.requestUpdate();
    const runs = this.session.running.jobs.length > 0;
    if (runs) this.#tick ??= setInterval(() => this.requestUpdate(), tickMs);
    else {
      clearInterval(this.#tick);
      this.#tick = undefined;
    }
  }

  #opened(): Promise<Engine> {
    this.#own = openEngine({
      ...(this.workerUrl === null ? {} : { workerUrl: this.workerUrl }),
      onStepBack: (sentence) => this.session.put({ said: sentence }),
    });
    return this.#own;
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'brim-host': BrimHost;
  }
}
