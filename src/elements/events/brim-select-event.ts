/** A pond is about to be selected, or none any more; prevent it to veto. */
export class BrimSelectEvent extends Event {
  /** Id of the pond, null for none. */
  readonly pond: string | null;

  constructor(pond: string | null) {
    super('brim-select', { bubbles: true, composed: true, cancelable: true });
    this.pond = pond;
  }
}

declare global {
  interface HTMLElementEventMap {
    'brim-select': BrimSelectEvent;
  }
}
