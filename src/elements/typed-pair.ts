import { numberSigns } from './typed-number.ts';

const number = '[+-]?(?:\\d+\\.?\\d*|\\.\\d+)(?:[eE][+-]?\\d+)?';
const pair = new RegExp(`^\\s*(${number})\\s*[,;\\s]\\s*(${number})\\s*$`);
const whole = new RegExp(`^${number}$`);
const withComma = /^[+-]?\d+,\d+$/;

/** Where the comma is the decimal sign, a point before three digits may part thousands. */
const mayBeGroup = /^[+-]?[1-9]\d{0,2}\.\d{3}$/;

/**
 * Two typed numbers, with a point as decimal sign; null when they are none, or could be read in two ways. In languages
 * with decimal commas a comma alone parts nothing: 3,45 is one number there, 3, 45 and 3;45 are two.
 */
export function typedPair(text: string, tag: string): readonly [string, string] | null {
  if (numberSigns(tag).decimal !== ',') {
    const match = pair.exec(text);
    return match && [match[1], match[2]];
  }
  const parts =
    /^(\S+?)\s*(?:;|,(?=\s)|\s)\s*(\S+)$/.exec(text.trim()) ??
    /^([^,]*\.[^,]*),([^,]*\.[^,]*)$/.exec(text.trim());
  const x = parts && pointed(parts[1]);
  const y = parts && pointed(parts[2]);
  return x && y ? [x, y] : null;
}

function pointed(text: string): string | null {
  if (withComma.test(text)) return text.replace(',', '.');
  return whole.test(text) && !mayBeGroup.test(text) ? text : null;
}

/** Two numbers as `typedPair` reads them. */
export function pairText(x: number, y: number, decimals: number, tag: string): string {
  const [first, second] = [x.toFixed(decimals), y.toFixed(decimals)];
  if (numberSigns(tag).decimal !== ',') return `${first}, ${second}`;
  return `${first.replace('.', ',')}; ${second.replace('.', ',')}`;
}
