/**
 * Decodes TIFF's LZW (TIFF 6.0, section 13: codes of 9 to 12 bits, high bit first, the width grows one code
 * early) into at most `capacity` bytes, whatever the data would unfold to. Returns what was decoded; codes that
 * no encoder writes end it early.
 */
export function decodeLzw(data: Uint8Array, capacity: number): Uint8Array {
  const clear = 256;
  const end = 257;
  const prefix = new Uint16Array(4096);
  const suffix = new Uint8Array(4096);
  const length = new Uint16Array(4096).fill(1, 0, 256);
  for (let i = 0; i < 256; i++) suffix[i] = i;
  const out = new Uint8Array(capacity);
  let filled = 0;
  let next = 258;
  let bits = 9;
  let previous = -1;
  let buffer = 0;
  let held = 0;
  let at = 0;
  while (filled < capacity) {
    while (held < bits && at < data.length) {
      buffer = ((buffer << 8) | data[at++]) & 0xffffff;
      held += 8;
    }
    if (held < bits) break;
    const code = (buffer >> (held - bits)) & ((1 << bits) - 1);
    held -= bits;
    if (code === end) break;
    if (code === clear) {
      next = 258;
      bits = 9;
      previous = -1;
      continue;
    }
    if (code > next || (code === next && previous < 0) || (code > 255 && previous < 0)) break;
    const known = code < next;
    const base = known ? code : previous;
    const count = length[base];
    let walk = base;
    for (let k = count - 1; k >= 0; k--) {
      if (filled + k < capacity) out[filled + k] = suffix[walk];
      if (k > 0) walk = prefix[walk];
    }
    const first = suffix[walk];
    filled += count;
    if (!known && filled < capacity) out[filled] = first;
    if (!known) filled++;
    if (previous >= 0 && next < 4096) {
      prefix[next] = previous;
      suffix[next] = first;
      length[next] = length[previous] + 1;
      next++;
      if (next + 1 === 1 << bits && bits < 12) bits++;
    }
    previous = code;
  }
  return out.subarray(0, Math.min(filled, capacity));
}
