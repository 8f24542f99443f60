import { type CSSResultGroup, html, LitElement, type PropertyDeclarations, type TemplateResult } from 'lit';
import { look } from './look.ts';
import type { Session, SessionChange, SessionState } from './session.ts';
import { SessionLink } from './session-link.ts';
import { toneAround, watchTone } from './tone.ts';
import { Voice } from './voice.ts';

/** What every card shares: the session of its host, its words, its look. */
export abstract class Card extends LitElement {
  /** The look that all cards share. */
  static readonly looks = [look];
  static override styles: CSSResultGroup = Card.looks;
  static override properties: PropertyDeclarations = { host: { type: String } };

  /** Id of a brim-host elsewhere on the page; without it the one around this element serves. */
  declare host: string | null;

  readonly #link = new SessionLink(this);
  #voice = new Voice();
  #endWatch: (() => void) | undefined;

  constructor() {
    super();
    this.host = null;
  }

  protected get session(): Session | undefined {
    return this.#link.session;
  }

  protected get state(): SessionState | undefined {
    return this.session?.state;
  }

  protected get voice(): Voice {
    return this.#voice;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.#endWatch = watchTone(() => this.requestUpdate());
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#endWatch?.();
  }

  /** Something of the session is new; `change` is undefined when all of it is. Cards add what they do then. */
  sessionChanged(session: Session, change: SessionChange | undefined): void {
    const { lang, units } = session.state;
    if (!change || change.keys.has('lang') || change.keys.has('units')) this.#voice = new Voice(lang, units);
    this.requestUpdate();
  }

  /** The card around a content. */
  protected card(heading: string, content: unknown): TemplateResult {
    // Only now: inside a host that has not rendered yet, a card is not laid out and has no colours around it.
    return html`
      <section part="card" class="card ${toneAround(this)}" aria-labelledby="heading" lang=${this.#voice.lang}>
        <h2 part="heading" id="heading">${heading}</h2>
        ${this.session ? content : html`<p part="hint" class="hint">${this.#voice.say('needsHost')}</p>`}
        <slot></slot>
      </section>
    `;
  }
}
