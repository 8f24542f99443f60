import type { FoundPonds } from '../ponds.ts';

/** Ponds are found, or found anew with other least sizes. */
export class BrimPondsEvent extends Event {
  readonly ponds: FoundPonds;

  constructor(ponds: FoundPonds) {
    super('brim-ponds', { bubbles: true, composed: true });
    this.ponds = ponds;
  }
}

declare global {
  interface HTMLElementEventMap {
    'brim-ponds': BrimPondsEvent;
  }
}
