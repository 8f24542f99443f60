import { OverbrimError } from '../core/error.ts';
import type { ReadLimits } from './limits.ts';
import type { RangeReader } from './range-reader.ts';

/** One entry of a TIFF directory: where its values lie, not the values. */
export interface TagEntry {
  readonly tag: number;
  readonly type: number;
  readonly count: number;
  readonly byteLength: number;
  /** Offset of the values in the file. */
  readonly at: number;
}

export interface Directory {
  readonly offset: number;
  readonly entries: ReadonlyMap<number, TagEntry>;
}

/** The chain of directories of a TIFF or BigTIFF file. */
export interface TiffFile {
  readonly reader: RangeReader;
  readonly limits: ReadLimits;
  readonly littleEndian: boolean;
  readonly big: boolean;
  readonly directories: readonly Directory[];
}

/** Bytes of one value by TIFF type (TIFF 6.0, section 2; 16 to 18 are BigTIFF's). 0: no such type. */
export const typeBytes = [0, 1, 1, 2, 4, 8, 1, 1, 2, 4, 8, 4, 8, 4, 0, 0, 8, 8, 8];

/** Whether bytes start with a tag, as HTML and XML do. */
function looksLikeMarkup(bytes: Uint8Array): boolean {
  return /^\s*<[!?a-z]/i.test(String.fromCharCode(...bytes.subarray(0, 8)));
}

/**
 * Walks the chain of directories without reading what they point to.
 * 1. The header tells byte order, plain TIFF (42) or BigTIFF (43), and the first directory's place.
 * 2. A directory is a count, that many entries of fixed size, and the place of the next.
 * 3. Every count and place is checked against the limits and the file's length before it is followed.
 * Source: TIFF 6.0 (1992), section 2; BigTIFF as used by OGC GeoTIFF 1.1.
 * @throws OverbrimError `unreadable` (no TIFF, truncated, circular, out of the file) or `too-large` (a limit).
 */
export async function readDirectories(reader: RangeReader, limits: ReadLimits): Promise<TiffFile> {
  const header = await headerOf(reader);
  const directories: Directory[] = [];
  const seen = new Set<number>();
  let offset = header.first;
  while (offset !== 0) {
    if (seen.has(offset)) {
      throw new OverbrimError(
        'unreadable',
        `The directories of ${reader.name} form a circle (byte ${offset} is reached twice); expected a chain with an end, so write the file anew.`,
      );
    }
    if (directories.length >= limits.directories) {
      throw new OverbrimError(
        'too-large',
        `${reader.name} has more than ${limits.directories} directories; expected one image with its overviews, so write the file anew.`,
      );
    }
    seen.add(offset);
    const { directory, next } = await directoryAt(reader, limits, header, offset);
    directories.push(directory);
    offset = next;
  }
  return { reader, limits, littleEndian: header.littleEndian, big: header.big, directories };
}

interface Header {
  littleEndian: boolean;
  big: boolean;
  first: number;
}

async function headerOf(reader: RangeReader): Promise<Header> {
  if (reader.size !== null && reader.size < 8) {
    throw new OverbrimError(
      'unreadable',
      `${reader.name} has only ${reader.size} bytes; expected a GeoTIFF file.`,
    );
  }
  const bytes = await reader.bytes(0, 8, 'the TIFF header');
  const order = String.fromCharCode(bytes[0], bytes[1]);
  const view = viewOf(bytes);
  const littleEndian = order === 'II';
  const version = view.getUint16(2, littleEndian);
  if ((order !== 'II' && order !== 'MM') || (version !== 42 && version !== 43)) {
    if (looksLikeMarkup(bytes)) {
      throw new OverbrimError(
        'unreadable',
        `${reader.name} is a web page or other marked-up text, not a TIFF file; servers send one in place of a missing file, so check the address.`,
      );
    }
    const found = Array.from(bytes.subarray(0, 4), (byte) => byte.toString(16).padStart(2, '0')).join(' ');
    throw new OverbrimError(
      'unreadable',
      `${reader.name} is not a TIFF file (it starts with bytes ${found}); expected a GeoTIFF of elevations.`,
    );
  }
  if (version === 42) return { littleEndian, big: false, first: view.getUint32(4, littleEndian) };
  const rest = viewOf(await reader.bytes(0, 16, 'the BigTIFF header'));
  if (rest.getUint16(4, littleEndian) !== 8) {
    throw new OverbrimError(
      'unreadable',
      `${reader.name} says that its BigTIFF offsets have ${rest.getUint16(4, littleEndian)} bytes; expected 8, so write the file anew.`,
    );
  }
  return { littleEndian, big: true, first: uint64(rest, 8, littleEndian) };
}

async function directoryAt(
  reader: RangeReader,
  limits: ReadLimits,
  { littleEndian, big }: Header,
  offset: number,
): Promise<{ directory: Directory; next: number }> {
  const countBytes = big ? 8 : 2;
  const entryBytes = big ? 20 : 12;
  const wordBytes = big ? 8 : 4;
  const head = viewOf(await reader.bytes(offset, countBytes, 'a directory'));
  const count = big ? uint64(head, 0, littleEndian) : head.getUint16(0, littleEndian);
  if (count > limits.entries) {
    throw new OverbrimError(
      'too-large',
      `A directory of ${reader.name} claims ${count} entries; expected at most ${limits.entries}, so write the file anew.`,
    );
  }
  const body = count * entryBytes + wordBytes;
  const view = viewOf(await reader.logged(offset + countBytes, body, `a directory of ${count} entries`));
  const entries = new Map<number, TagEntry>();
  for (let i = 0; i < count; i++) {
    const at = i * entryBytes;
    const tag = view.getUint16(at, littleEndian);
    const type = view.getUint16(at + 2, littleEndian);
    const values = big ? uint64(view, at + 4, littleEndian) : view.getUint32(at + 4, littleEndian);
    const byteLength = values * (typeBytes[type] ?? 0);
    const inside = byteLength <= wordBytes;
    const field = at + entryBytes - wordBytes;
    const pointer = big ? uint64(view, field, littleEndian) : view.getUint32(field, littleEndian);
    entries.set(tag, {
      tag,
      type,
      count: values,
      byteLength,
      at: inside ? offset + countBytes + field : pointer,
    });
  }
  const end = count * entryBytes;
  const next = big ? uint64(view, end, littleEndian) : view.getUint32(end, littleEndian);
  return { directory: { offset, entries }, next };
}

export function viewOf(bytes: Uint8Array): DataView {
  return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

/** Above 2⁵³ the number is not exact, but then it lies outside any file and is refused by its size. */
export function uint64(view: DataView, at: number, littleEndian: boolean): number {
  return Number(view.getBigUint64(at, littleEndian));
}
