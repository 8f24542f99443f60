import { ContextEvent, createContext } from '@lit/context';
import type { ReactiveController, ReactiveElement } from 'lit';
import type { Session, SessionChange } from './session.ts';

/** How elements inside a host find its session. */
export const sessionContext = createContext<Session>(Symbol.for('overbrim.session'));

/** Event by which a host tells the page that it is there, or, on the document, that it is gone. */
export const hostConnected = 'brim-host-connected';

/** An element that may name its host by id and hears of changes. */
interface Linked extends ReactiveElement {
  readonly host: string | null;
  /** `change` is undefined when the session itself is another. */
  sessionChanged(session: Session, change: SessionChange | undefined): void;
}

/** Joins an element to the session of the host around it, or of the one that it names. */
export class SessionLink implements ReactiveController {
  readonly #element: Linked;
  #session: Session | undefined;
  #named: string | null = null;
  #leave: (() => void) | undefined;

  constructor(element: Linked) {
    this.#element = element;
    element.addController(this);
  }

  get session(): Session | undefined {
    return this.#session;
  }

  readonly #onHost = (): void => this.#find();

  hostConnected(): void {
    this.#find();
    // A host that is defined, or comes to the page, later than this element could not answer yet.
    document.addEventListener(hostConnected, this.#onHost);
  }

  hostDisconnected(): void {
    document.removeEventListener(hostConnected, this.#onHost);
    // An element that is only moved on the page is back at once, mostly with the same session.
    queueMicrotask(() => {
      if (!this.#element.isConnected) this.#join(undefined);
    });
  }

  hostUpdate(): void {
    if (this.#named !== this.#element.host) this.#find();
  }

  #find(): void {
    const element = this.#element;
    if (!element.isConnected) return;
    this.#named = element.host;
    if (element.host !== null) {
      const root = element.getRootNode() as Document | ShadowRoot;
      const found = root.getElementById(element.host) ?? document.getElementById(element.host);
      this.#join(found ? Reflect.get(found, 'session') : undefined);
      return;
    }
    let around: Session | undefined;
    element.dispatchEvent(
      new ContextEvent(sessionContext, element, (session) => {
        around = session;
      }),
    );
    this.#join(around);
  }

  #join(session: Session | undefined): void {
    if (session === this.#session) return;
    this.#leave?.();
    this.#leave = undefined;
    this.#session = session;
    if (session) {
      const onChange = (event: Event): void => this.#element.sessionChanged(session, event as SessionChange);
      session.addEventListener('change', onChange);
      this.#leave = () => session.removeEventListener('change', onChange);
      this.#element.sessionChanged(session, undefined);
    }
    this.#element.requestUpdate();
  }
}
