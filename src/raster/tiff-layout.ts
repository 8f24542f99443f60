/** Field types of TIFF 6.0 section 2. */
export type Field =
  | { readonly type: 'ascii'; readonly bytes: Uint8Array }
  | { readonly type: 'short' | 'long' | 'double'; readonly values: ArrayLike<number> };

/** One directory: its fields by tag. */
export type Directory = ReadonlyMap<number, Field>;

const codes = { ascii: 2, short: 3, long: 4, double: 12 } as const;
const sizes = { ascii: 1, short: 2, long: 4, double: 8 } as const;

/** Room that the header and all directories take, so that data can be placed behind them. */
export function headSize(directories: readonly Directory[]): number {
  let size = 8;
  for (const directory of directories) size += directorySize(directory);
  return size;
}

/**
 * The little-endian classic TIFF header and all directories, one after the other, each followed by the values
 * that do not fit into its entries (TIFF 6.0 section 2: tags ascending, offsets even).
 */
export function headBytes(directories: readonly Directory[]): Uint8Array {
  const bytes = new Uint8Array(headSize(directories));
  const view = new DataView(bytes.buffer);
  bytes.set([0x49, 0x49, 42, 0]);
  view.setUint32(4, 8, true);
  let at = 8;
  directories.forEach((directory, i) => {
    const next = at + directorySize(directory);
    writeDirectory(view, at, directory, i + 1 < directories.length ? next : 0);
    at = next;
  });
  return bytes;
}

function writeDirectory(view: DataView, start: number, directory: Directory, next: number): void {
  const tags = [...directory].sort((a, b) => a[0] - b[0]);
  view.setUint16(start, tags.length, true);
  let entry = start + 2;
  let beyond = start + 6 + 12 * tags.length;
  for (const [tag, field] of tags) {
    view.setUint16(entry, tag, true);
    view.setUint16(entry + 2, codes[field.type], true);
    view.setUint32(entry + 4, countOf(field), true);
    if (valueSize(field) <= 4) writeValues(view, entry + 8, field);
    else {
      view.setUint32(entry + 8, beyond, true);
      writeValues(view, beyond, field);
      beyond += even(valueSize(field));
    }
    entry += 12;
  }
  view.setUint32(entry, next, true);
}

function writeValues(view: DataView, at: number, field: Field): void {
  if (field.type === 'ascii') {
    new Uint8Array(view.buffer).set(field.bytes, at);
    return;
  }
  for (let i = 0; i < field.values.length; i++) {
    if (field.type === 'short') view.setUint16(at + 2 * i, field.values[i], true);
    else if (field.type === 'long') view.setUint32(at + 4 * i, field.values[i], true);
    else view.setFloat64(at + 8 * i, field.values[i], true);
  }
}

function directorySize(directory: Directory): number {
  let size = 6 + 12 * directory.size;
  for (const field of directory.values()) if (valueSize(field) > 4) size += even(valueSize(field));
  return size;
}

function countOf(field: Field): number {
  return field.type === 'ascii' ? field.bytes.length : field.values.length;
}

function valueSize(field: Field): number {
  return countOf(field) * sizes[field.type];
}

function even(size: number): number {
  return size + (size & 1);
}
