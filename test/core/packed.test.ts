import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { allocatePacked, viewPacked } from '../../src/core/packed.ts';

const layout = [
  ['flags', 'u8'],
  ['labels', 'i32'],
  ['counts', 'u32'],
  ['heights', 'f32'],
  ['none', 'f32'],
  ['sums', 'f64'],
] as const;
const kind = 7;

function sample(): ArrayBuffer {
  const lengths = { flags: 3, labels: 2, counts: 1, heights: 3, none: 0, sums: 2 };
  const { buffer, sections } = allocatePacked(kind, layout, lengths);
  sections.flags.set([1, 0, 255]);
  sections.labels.set([-1, 2 ** 31 - 1]);
  sections.counts.set([2 ** 32 - 1]);
  sections.heights.set([0.5, -1e30, Number.NaN]);
  sections.sums.set([1e300, -0.1]);
  return buffer;
}

function refusal(buffer: ArrayBuffer): string {
  try {
    viewPacked(buffer, kind, layout);
  } catch (error) {
    if (error instanceof OverbrimError && error.code === 'unreadable') return error.message;
    throw error;
  }
  return 'taken';
}

describe('a packed structure', () => {
  it('starts with zeros', () => {
    const { sections } = allocatePacked(1, [['a', 'f64']] as const, { a: 4 });
    expect([...sections.a]).toEqual([0, 0, 0, 0]);
  });

  it('comes back from its bytes, moved and copied', () => {
    const moved = structuredClone(sample());
    const back = viewPacked(moved, kind, layout);
    expect([...back.flags]).toEqual([1, 0, 255]);
    expect([...back.labels]).toEqual([-1, 2 ** 31 - 1]);
    expect([...back.counts]).toEqual([2 ** 32 - 1]);
    expect([...back.heights]).toEqual([0.5, Math.fround(-1e30), Number.NaN]);
    expect(back.none.length).toBe(0);
    expect([...back.sums]).toEqual([1e300, -0.1]);
    expect(back.sums.buffer).toBe(moved);
  });

  it('starts with the letters OVBR, version 1 and its kind, little-endian', () => {
    const bytes = new Uint8Array(sample());
    expect(String.fromCharCode(...bytes.subarray(0, 4))).toBe('OVBR');
    expect([...bytes.subarray(4, 16)]).toEqual([1, 0, 0, 0, kind, 0, 0, 0, layout.length, 0, 0, 0]);
  });
});

describe('a buffer that is none is refused in a sentence', () => {
  const expected = `expected 1380079183, 1, ${kind}, ${layout.length}, so make it again with this version.`;
  const withWord = (at: number, word: number): ArrayBuffer => {
    const buffer = sample();
    new Uint32Array(buffer)[at] = word;
    return buffer;
  };

  it('another magic, version, kind or number of sections', () => {
    expect(refusal(withWord(0, 5))).toBe(`A packed structure starts with the words 5, 1, 7, 6; ${expected}`);
    expect(refusal(withWord(1, 2))).toContain('starts with the words 1380079183, 2, 7, 6; expected');
    expect(refusal(withWord(2, 8))).toContain('starts with the words 1380079183, 1, 8, 6; expected');
    expect(refusal(withWord(3, 9))).toContain('starts with the words 1380079183, 1, 7, 9; expected');
  });

  it('a buffer too short for its head, down to nothing', () => {
    for (const bytes of [0, 3, 4, 13, 16, 40]) expect(refusal(sample().slice(0, bytes))).toContain(expected);
  });

  it('a section of another type', () => {
    expect(refusal(withWord(4, 3))).toBe(
      `Section "flags" of a packed structure is of another type or cut off at ${sample().byteLength} bytes; expected 3 values of u8, so make it again.`,
    );
  });

  it('a cut off section, at whatever byte', () => {
    const whole = sample();
    const cut = whole.byteLength - 1;
    expect(refusal(whole.slice(0, cut))).toBe(
      `Section "sums" of a packed structure is of another type or cut off at ${cut} bytes; expected 2 values of f64, so make it again.`,
    );
    for (let bytes = 0; bytes < whole.byteLength; bytes++)
      expect(refusal(whole.slice(0, bytes))).not.toBe('taken');
  });

  it('a section that claims more than there is', () => {
    expect(refusal(withWord(5, 2 ** 32 - 1))).toContain('expected 4294967295 values of u8');
    expect(refusal(withWord(6, 2 ** 20))).toContain('expected 4503599627370499 values of u8');
  });
});
