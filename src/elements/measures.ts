import type { MessageKey } from './messages.ts';
import { numberTag, words } from './words.ts';

export type UnitSystem = 'metric' | 'us';

/** Metres, square metres and cubic metres in the international foot, acre and acre-foot (exact by definition). */
export const footM = 0.3048;
export const acreM2 = 4046.8564224;
export const acreFootM3 = acreM2 * footM;
const mileM = 1609.344;

/** A unit that a number field is typed in. */
export interface FieldUnit {
  readonly symbol: string;
  /** SI value of one. */
  readonly size: number;
}

/** No-break space, so that a number never parts from its unit. */
const nbsp = '\u00a0';

/** Numbers with their units, by language and system of units. Values come in metres, square and cubic metres. */
export class Measures {
  readonly lang: string;
  readonly system: UnitSystem;

  constructor(lang: string, system: UnitSystem) {
    this.lang = lang;
    this.system = system;
  }

  /** To the centimetre. */
  elevation(m: number): string {
    return this.#isUs ? this.#fixed(m / footM, 2, 'foot') : this.#fixed(m, 2, 'metre');
  }

  depth(m: number): string {
    return this.elevation(m);
  }

  length(m: number): string {
    if (this.#isUs) {
      return Math.abs(m) < mileM ? this.#figures(m / footM, 'foot') : this.#figures(m / mileM, 'mile');
    }
    return Math.abs(m) < 1000 ? this.#figures(m, 'metre') : this.#figures(m / 1000, 'kilometre');
  }

  area(m2: number): string {
    if (this.#isUs) {
      if (m2 < acreM2 / 10) return this.#figures(m2 / footM ** 2, 'squareFoot');
      return m2 < mileM ** 2
        ? this.#figures(m2 / acreM2, 'acre')
        : this.#figures(m2 / mileM ** 2, 'squareMile');
    }
    if (m2 < 10_000) return this.#figures(m2, 'squareMetre');
    return m2 < 1e7 ? this.#figures(m2 / 10_000, 'hectare') : this.#figures(m2 / 1e6, 'squareKilometre');
  }

  /** To three figures. */
  volume(m3: number): string {
    if (!this.#isUs) return this.#figures(m3, 'cubicMetre');
    return m3 < acreFootM3 / 10
      ? this.#figures(m3 / footM ** 3, 'cubicFoot')
      : this.#figures(m3 / acreFootM3, 'acreFoot');
  }

  /** A limit between classes: as short as it can be. */
  limit(m: number): string {
    return this.#isUs ? this.#figures(m / footM, 'foot', 2) : this.#figures(m, 'metre', 2);
  }

  count(value: number): string {
    return this.#number(value, { maximumFractionDigits: 0 });
  }

  /** A coordinate or another number with so many decimals at most, no unit. */
  decimals(value: number, most: number): string {
    return this.#number(value, { maximumFractionDigits: most, useGrouping: false });
  }

  share(fraction: number): string {
    return this.#number(fraction, { style: 'percent', maximumSignificantDigits: 2 });
  }

  duration(ms: number): string {
    const seconds = Math.round(ms / 1000);
    if (seconds < 60) return words(this.lang, 'seconds', { value: seconds });
    return words(this.lang, 'minutes', { minutes: Math.floor(seconds / 60), seconds: seconds % 60 });
  }

  /** Units that least sizes are typed in. */
  get fieldUnits(): Readonly<Record<'depth' | 'area' | 'capacity', FieldUnit>> {
    const unit = (key: MessageKey, size: number): FieldUnit => ({ symbol: this.#symbol(key), size });
    return this.#isUs
      ? { depth: unit('foot', footM), area: unit('acre', acreM2), capacity: unit('acreFoot', acreFootM3) }
      : { depth: unit('metre', 1), area: unit('squareMetre', 1), capacity: unit('cubicMetre', 1) };
  }

  get #isUs(): boolean {
    return this.system === 'us';
  }

  #symbol(key: MessageKey): string {
    return words(this.lang, key);
  }

  #fixed(value: number, decimals: number, key: MessageKey): string {
    const digits = { minimumFractionDigits: decimals, maximumFractionDigits: decimals };
    // What rounds to nothing has no sign.
    const steady = Math.abs(value) < 0.5 * 10 ** -decimals ? 0 : value;
    return this.#number(steady, digits) + nbsp + this.#symbol(key);
  }

  #figures(value: number, key: MessageKey, figures = 3): string {
    // What is less than a thousandth of the unit is noise of the arithmetic.
    const steady = Math.abs(value) < 5e-4 ? 0 : value;
    return this.#number(steady, { maximumSignificantDigits: figures }) + nbsp + this.#symbol(key);
  }

  #number(value: number, options: Intl.NumberFormatOptions): string {
    return new Intl.NumberFormat(numberTag(this.lang), options).format(value);
  }
}
