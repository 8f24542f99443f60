import { numberTag } from './words.ts';

/** What a language writes between groups of digits and before decimals. */
export interface NumberSigns {
  readonly group: string;
  readonly decimal: string;
}

/** The signs of a language, by ECMA-402 `formatToParts`. */
export function numberSigns(tag: string): NumberSigns {
  const parts = new Intl.NumberFormat(numberTag(tag), { useGrouping: true }).formatToParts(1234567.5);
  const sign = (type: string): string => parts.find((part) => part.type === type)?.value ?? '';
  return { group: sign('group'), decimal: sign('decimal') || '.' };
}

/** A number as a field shows it: signs of the language, no groups. */
export function fieldNumber(value: number, tag: string): string {
  const digits = { maximumSignificantDigits: 6, useGrouping: false };
  return new Intl.NumberFormat(numberTag(tag), digits).format(value);
}

/**
 * A typed number of at least 0 in the signs of a language; null when it is none, or could be read in two ways.
 * Groups count only where the language itself would put them: in English 1,000 is a thousand, and 1,5 is nothing.
 */
export function typedNumber(text: string, tag: string): number | null {
  const { decimal } = numberSigns(tag);
  const [whole, decimals, ...more] = latin(text.trim(), tag).split(decimal);
  if (more.length > 0 || (decimals !== undefined && !/^\d*$/.test(decimals))) return null;
  const digits = whole.replace(/\D/g, '');
  if (digits + (decimals ?? '') === '') return null;
  const grouped = new Intl.NumberFormat(numberTag(tag), { useGrouping: true }).format(Number(digits));
  if (whole !== digits && latin(whole, tag) !== latin(grouped, tag)) return null;
  return Number(`${digits || '0'}.${decimals || '0'}`);
}

/** Digits of the language as 0 to 9, all spaces and all apostrophes alike, as keyboards have but one of each. */
function latin(text: string, tag: string): string {
  const own = [...new Intl.NumberFormat(numberTag(tag), { useGrouping: false }).format(9876543210)].reverse();
  return [...text]
    .map((sign) => (own.includes(sign) ? String(own.indexOf(sign)) : sign))
    .join('')
    .replace(/\s/g, ' ')
    .replaceAll('’', "'");
}
