import { Measures, type UnitSystem } from './measures.ts';
import type { MessageKey } from './messages.ts';
import { servedLanguage, type Values, words } from './words.ts';

/** How an element speaks: words and measures of one language and system of units. */
export class Voice {
  /** The language that the words are in; numbers follow the rules of the one that was asked for. */
  readonly lang: string;
  readonly measures: Measures;
  readonly #asked: string;

  constructor(lang = 'en', units: UnitSystem = 'metric') {
    this.#asked = lang;
    this.lang = servedLanguage(lang);
    this.measures = new Measures(lang, units);
  }

  /** Bound, so that templates may take it out of the voice. */
  readonly say = (key: MessageKey, values?: Values): string => words(this.#asked, key, values);
}
