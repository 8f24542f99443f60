import type { TracedPath } from '../traced-path.ts';

/** A spill path is traced. */
export class BrimPathEvent extends Event {
  readonly path: TracedPath;

  constructor(path: TracedPath) {
    super('brim-path', { bubbles: true, composed: true });
    this.path = path;
  }
}

declare global {
  interface HTMLElementEventMap {
    'brim-path': BrimPathEvent;
  }
}
