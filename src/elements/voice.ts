import { Measures, type UnitSystem } from './measures.ts';
import type { MessageKey } from './messages.ts';
import { type Values, words } from './words.ts';

/** How an element speaks: words and measures of one language and system of units. */
export class Voice {
  readonly lang: string;
  readonly measures: Measures;

  constructor(lang = 'en', units: UnitSystem = 'metric') {
    this.lang = lang;
    this.measures = new Measures(lang, units);
  }

  /** Bound, so that templates may take it out of the voice. */
  readonly say = (key: MessageKey, values?: Values): string => words(this.lang, key, values);
}
