import type { Surveyed } from '../session.ts';

/** A terrain is surveyed and shown. */
export class BrimTerrainEvent extends Event {
  readonly terrain: Surveyed;

  constructor(terrain: Surveyed) {
    super('brim-terrain', { bubbles: true, composed: true });
    this.terrain = terrain;
  }
}

declare global {
  interface HTMLElementEventMap {
    'brim-terrain': BrimTerrainEvent;
  }
}
