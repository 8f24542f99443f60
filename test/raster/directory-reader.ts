/** A directory as it stands in the file, for tests: every entry's type, count and values, and where it lies. */
export interface RawDirectory {
  readonly offset: number;
  readonly end: number;
  readonly tags: readonly number[];
  readonly entries: ReadonlyMap<number, { readonly type: number; readonly values: number[] }>;
}

const sizes: Record<number, number> = { 2: 1, 3: 2, 4: 4, 12: 8 };

/** Reads a little-endian classic TIFF by TIFF 6.0 section 2, with nothing from the writer. */
export function readDirectories(bytes: Uint8Array): RawDirectory[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (bytes[0] !== 0x49 || bytes[1] !== 0x49 || view.getUint16(2, true) !== 42) throw new Error('no II*');
  const directories: RawDirectory[] = [];
  let offset = view.getUint32(4, true);
  while (offset !== 0) {
    const count = view.getUint16(offset, true);
    let end = offset + 6 + 12 * count;
    const tags: number[] = [];
    const entries = new Map<number, { type: number; values: number[] }>();
    for (let i = 0; i < count; i++) {
      const entry = offset + 2 + 12 * i;
      const tag = view.getUint16(entry, true);
      const type = view.getUint16(entry + 2, true);
      const length = view.getUint32(entry + 4, true);
      const size = sizes[type] * length;
      const at = size <= 4 ? entry + 8 : view.getUint32(entry + 8, true);
      if (size > 4) {
        if (at % 2 !== 0) throw new Error(`values of tag ${tag} begin at the odd offset ${at}`);
        end = Math.max(end, at + size);
      }
      const values = Array.from({ length }, (_, k) => {
        if (type === 2) return view.getUint8(at + k);
        if (type === 3) return view.getUint16(at + 2 * k, true);
        return type === 4 ? view.getUint32(at + 4 * k, true) : view.getFloat64(at + 8 * k, true);
      });
      tags.push(tag);
      entries.set(tag, { type, values });
    }
    directories.push({ offset, end, tags, entries });
    offset = view.getUint32(offset + 2 + 12 * count, true);
  }
  return directories;
}

export function valuesOf(directory: RawDirectory, tag: number): number[] {
  const entry = directory.entries.get(tag);
  if (entry === undefined) throw new Error(`tag ${tag} is missing`);
  return entry.values;
}

/** The text of an ASCII tag, its closing NUL asserted away. */
export function textOf(directory: RawDirectory, tag: number): string {
  const values = valuesOf(directory, tag);
  if (values.at(-1) !== 0) throw new Error(`the text of tag ${tag} lacks its NUL`);
  return new TextDecoder().decode(Uint8Array.from(values.slice(0, -1)));
}
