import { type MessageKey, messages } from './messages.ts';

/** What is filled into a message; numbers are written by the language's rules. */
export type Values = Readonly<Record<string, string | number>>;

/** The language of ours that serves a language tag: itself, its base language, else English. */
export function servedLanguage(tag: string): string {
  const lower = tag.toLowerCase();
  if (messages[lower] !== undefined) return lower;
  const base = lower.split('-')[0];
  return messages[base] === undefined ? 'en' : base;
}

/** A message in a language, filled in; `count` chooses the plural. */
export function words(tag: string, key: MessageKey, values: Values = {}): string {
  const language = servedLanguage(tag);
  const message = messages[language][key];
  const text = typeof message === 'string' ? message : message[plural(language, values.count)];
  return text.replace(/\{(\w+)\}/g, (all, name: string) => {
    const value = values[name];
    if (value === undefined) return all;
    return typeof value === 'number' ? new Intl.NumberFormat(numberTag(tag)).format(value) : value;
  });
}

/**
 * What a page says of an error. Sentences are made for every edge of the project; options of the command line and names
 * of inputs mean nothing to a reader of a page.
 */
export function pageSentence(tag: string, message: string): string {
  if (/--vertical-unit (m|ft|us-ft) was given/.test(message)) return words(tag, 'otherUnit');
  return message
    .replace(/ \(--[a-z-]+( [a-z]+)?\)/g, '')
    .replace(/(,? (such as|with|give)) --[a-z-]+( [a-z|-]+)?/g, '')
    .replace(/([Tt])he input "crs"/g, '$1he CRS')
    .replace(/The input "(\w+)"/g, '"$1"');
}

/** The tag for numbers and dates; one that `Intl` does not take counts as English. */
export function numberTag(tag: string): string {
  try {
    return Intl.getCanonicalLocales(tag)[0] ?? 'en';
  } catch {
    return 'en';
  }
}

function plural(language: string, count: string | number | undefined): 'one' | 'other' {
  return new Intl.PluralRules(language).select(Number(count)) === 'one' ? 'one' : 'other';
}
