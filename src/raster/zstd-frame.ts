/**
 * Length that a Zstandard frame says it unpacks to, null when it does not tell (RFC 8878, section 3.1.1.1).
 * Known before unpacking, so that no frame can unfold without bound.
 */
export function zstdContentBytes(data: Uint8Array): number | null {
  if (data.length < 6) return null;
  const view = new DataView(data.buffer, data.byteOffset, data.byteLength);
  if (view.getUint32(0, true) !== 0xfd2fb528) return null;
  const descriptor = data[4];
  const single = (descriptor >> 5) & 1;
  const dictionary = [0, 1, 2, 4][descriptor & 3];
  const flag = descriptor >> 6;
  const fieldBytes = flag === 0 ? single : [0, 2, 4, 8][flag];
  const at = 5 + (single ? 0 : 1) + dictionary;
  if (fieldBytes === 0 || at + fieldBytes > data.length) return null;
  if (fieldBytes === 1) return data[at];
  if (fieldBytes === 2) return view.getUint16(at, true) + 256;
  if (fieldBytes === 4) return view.getUint32(at, true);
  return Number(view.getBigUint64(at, true));
}
