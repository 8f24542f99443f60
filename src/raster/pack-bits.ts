/** Decodes PackBits (TIFF 6.0, section 9: runs of bytes) into at most `capacity` bytes; returns what was decoded. */
export function decodePackBits(data: Uint8Array, capacity: number): Uint8Array {
  const out = new Uint8Array(capacity);
  let filled = 0;
  for (let at = 0; at < data.length && filled < capacity; ) {
    const head = data[at++];
    if (head === 128) continue;
    if (head < 128) {
      const literal = data.subarray(at, Math.min(at + head + 1, at + capacity - filled));
      out.set(literal, filled);
      filled += literal.length;
      at += head + 1;
    } else {
      const end = Math.min(filled + 257 - head, capacity);
      if (at < data.length) out.fill(data[at++], filled, end);
      filled = end;
    }
  }
  return out.subarray(0, filled);
}
