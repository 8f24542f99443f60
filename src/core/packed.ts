import { OverbrimError } from './error.ts';

/**
 * Several typed arrays in one ArrayBuffer that can be transferred, kept or mapped as it is.
 *
 * Layout, little-endian 32-bit words: magic "OVBR", version, kind, number of sections; then a pair of words a
 * section (element type, and the two halves of its length as a third); then the sections, each on 8 bytes.
 */
const magic = 0x5242564f;
const version = 1;
const headWords = 4;
const wordsPerSection = 3;

const elementTypes = [Uint8Array, Int32Array, Uint32Array, Float32Array, Float64Array] as const;
export type Packable = Uint8Array | Int32Array | Uint32Array | Float32Array | Float64Array;
export type ElementType = 'u8' | 'i32' | 'u32' | 'f32' | 'f64';
const typeNames: readonly ElementType[] = ['u8', 'i32', 'u32', 'f32', 'f64'];

/** Names and element types of the sections of one kind of packed structure, in order. */
export type Layout = readonly (readonly [name: string, type: ElementType])[];

interface ArrayOf {
  u8: Uint8Array;
  i32: Int32Array;
  u32: Uint32Array;
  f32: Float32Array;
  f64: Float64Array;
}

/** The arrays of a packed structure by name. */
export type Sections<L extends Layout> = {
  readonly [E in L[number] as E[0]]: ArrayOf[E[1]];
};

/** A new buffer with room for the given lengths, and views of its zeroed sections. */
export function allocatePacked<L extends Layout>(
  kind: number,
  layout: L,
  lengths: { readonly [E in L[number] as E[0]]: number },
): { buffer: ArrayBuffer; sections: Sections<L> } {
  const counts = layout.map(([name]) => (lengths as Record<string, number>)[name]);
  let bytes = aligned((headWords + wordsPerSection * layout.length) * 4);
  layout.forEach(([, type], i) => {
    bytes += aligned(counts[i] * bytesOf(type));
  });
  const buffer = new ArrayBuffer(bytes);
  const words = new Uint32Array(buffer, 0, headWords + wordsPerSection * layout.length);
  words.set([magic, version, kind, layout.length]);
  layout.forEach(([, type], i) => {
    const at = headWords + wordsPerSection * i;
    words[at] = typeNames.indexOf(type);
    words[at + 1] = counts[i] >>> 0;
    words[at + 2] = counts[i] / 4294967296;
  });
  return { buffer, sections: viewPacked(buffer, kind, layout) };
}

/**
 * Views of the sections of a packed buffer.
 * @throws OverbrimError `unreadable` when it is not a buffer of this kind, layout and version.
 */
export function viewPacked<L extends Layout>(buffer: ArrayBuffer, kind: number, layout: L): Sections<L> {
  const headBytes = (headWords + wordsPerSection * layout.length) * 4;
  const words = new Uint32Array(
    buffer,
    0,
    Math.min(headBytes, buffer.byteLength - (buffer.byteLength % 4)) / 4,
  );
  const expected = [magic, version, kind, layout.length];
  if (buffer.byteLength < headBytes || expected.some((word, i) => words[i] !== word)) {
    const found = Array.from(words.slice(0, headWords)).join(', ');
    throw new OverbrimError(
      'unreadable',
      `A packed structure starts with the words ${found}; expected ${expected.join(', ')}, so make it again with this version.`,
    );
  }
  const sections: Record<string, Packable> = {};
  let offset = aligned(headBytes);
  layout.forEach(([name, type], i) => {
    const at = headWords + wordsPerSection * i;
    const length = words[at + 1] + words[at + 2] * 4294967296;
    const end = offset + aligned(length * bytesOf(type));
    if (typeNames[words[at]] !== type || end > buffer.byteLength) {
      throw new OverbrimError(
        'unreadable',
        `Section "${name}" of a packed structure is of another type or cut off at ${buffer.byteLength} bytes; expected ${length} values of ${type}, so make it again.`,
      );
    }
    sections[name] = new elementTypes[typeNames.indexOf(type)](buffer, offset, length);
    offset = end;
  });
  return sections as Sections<L>;
}

function bytesOf(type: ElementType): number {
  return elementTypes[typeNames.indexOf(type)].BYTES_PER_ELEMENT;
}

function aligned(bytes: number): number {
  return Math.ceil(bytes / 8) * 8;
}
