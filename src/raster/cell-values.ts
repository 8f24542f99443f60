import { OverbrimError } from '../core/error.ts';
import type { Directory, TiffFile } from './directories.ts';
import type { SampleType } from './sample-type.ts';
import { tags, textOf } from './tag-values.ts';

/** What stored values mean: `stored × scale + offset`, void where `stored` equals `noData` (or is NaN). */
export interface ValueMeaning {
  readonly scale: number;
  readonly offset: number;
  /** As the sample type holds it; null when there is none, or none that the type could hold. */
  readonly noData: number | null;
}

/**
 * Reads the no-data value (tag 42113, text) and scale and offset (items with these roles in the XML of tag 42112).
 * @throws OverbrimError `unreadable` when one of them is no number.
 */
export async function valueMeaning(
  tiff: TiffFile,
  directory: Directory,
  type: SampleType,
): Promise<ValueMeaning> {
  const xml = (await textOf(tiff, directory, tags.metadata)) ?? '';
  const noData = await textOf(tiff, directory, tags.noData);
  return {
    scale: itemWithRole(xml, 'scale', tiff.reader.name) ?? 1,
    offset: itemWithRole(xml, 'offset', tiff.reader.name) ?? 0,
    noData: noData === null || noData.trim() === '' ? null : stored(noDataOf(noData, tiff.reader.name), type),
  };
}

function noDataOf(text: string, name: string): number {
  const word = text.trim().toLowerCase();
  if (/^[+-]?nan$/.test(word)) return Number.NaN;
  if (/^[+-]?inf(inity)?$/.test(word))
    return word.startsWith('-') ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
  const value = Number(word);
  if (Number.isNaN(value)) {
    throw new OverbrimError(
      'unreadable',
      `${name} gives "${text.trim()}" as its no-data value (tag 42113); expected a number, so write the file anew.`,
    );
  }
  return value;
}

/** The value as the file's cells hold it: −9999.1 is another number in 32 bits than in 64. */
function stored(value: number, type: SampleType): number {
  if (type === 'float32') {
    const rounded = Math.fround(value);
    // Decimal text of the greatest float is often rounded up past it.
    return Number.isFinite(value) && !Number.isFinite(rounded) ? Math.sign(value) * greatestFloat32 : rounded;
  }
  return value;
}

const greatestFloat32 = 3.4028234663852886e38;

function itemWithRole(xml: string, role: string, name: string): number | null {
  for (const [, attributes, text] of xml.matchAll(/<Item\b([^>]*)>([^<]*)<\/Item>/g)) {
    if (new RegExp(`\\brole\\s*=\\s*["']${role}["']`).test(attributes)) {
      const value = Number(text);
      if (text.trim() === '' || !Number.isFinite(value)) {
        throw new OverbrimError(
          'unreadable',
          `${name} gives "${text.trim()}" as the ${role} of its values (tag 42112); expected a number, so write the file anew.`,
        );
      }
      return value;
    }
  }
  return null;
}
