/** Something went wrong; the host shows the message unless a listener prevents that. */
export class BrimErrorEvent extends Event {
  /** A word that programs can test. */
  readonly code: string;
  /** One sentence for people. */
  readonly message: string;

  constructor(code: string, message: string) {
    super('brim-error', { bubbles: true, composed: true, cancelable: true });
    this.code = code;
    this.message = message;
  }
}

declare global {
  interface HTMLElementEventMap {
    'brim-error': BrimErrorEvent;
  }
}
