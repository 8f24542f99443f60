/** How one cell's value is stored. */
export type SampleType =
  | 'uint8'
  | 'uint16'
  | 'uint32'
  | 'int8'
  | 'int16'
  | 'int32'
  | 'float16'
  | 'float32'
  | 'float64';

export const sampleBytes: Record<SampleType, number> = {
  uint8: 1,
  uint16: 2,
  uint32: 4,
  int8: 1,
  int16: 2,
  int32: 4,
  float16: 2,
  float32: 4,
  float64: 8,
};

/** From tags 339 (1 unsigned, 2 signed, 3 float) and 258 (bits); null when no such type is read here. */
export function sampleTypeOf(format: number, bits: number): SampleType | null {
  const kind = ({ 1: 'uint', 2: 'int', 3: 'float' } as Record<number, string>)[format];
  const name = `${kind}${bits}`;
  return name in sampleBytes ? (name as SampleType) : null;
}

export type Samples =
  | Uint8Array
  | Uint16Array
  | Uint32Array
  | Int8Array
  | Int16Array
  | Int32Array
  | Float32Array
  | Float64Array;

const hostIsLittleEndian = new Uint8Array(new Uint16Array([1]).buffer)[0] === 1;

/** Decoded bytes of a block as numbers. `bytes` is used up: it may be swapped in place. */
export function samplesOf(bytes: Uint8Array, type: SampleType, littleEndian: boolean): Samples {
  const width = sampleBytes[type];
  const count = Math.floor(bytes.length / width);
  const own = bytes.byteOffset % width === 0 ? bytes : bytes.slice();
  if (width > 1 && littleEndian !== hostIsLittleEndian) swap(own, width);
  const at = own.byteOffset;
  const buffer = own.buffer;
  switch (type) {
    case 'uint8':
      return new Uint8Array(buffer, at, count);
    case 'uint16':
      return new Uint16Array(buffer, at, count);
    case 'uint32':
      return new Uint32Array(buffer, at, count);
    case 'int8':
      return new Int8Array(buffer, at, count);
    case 'int16':
      return new Int16Array(buffer, at, count);
    case 'int32':
      return new Int32Array(buffer, at, count);
    case 'float16':
      return Float32Array.from(new Uint16Array(buffer, at, count), fromHalf);
    case 'float32':
      return new Float32Array(buffer, at, count);
    case 'float64':
      return new Float64Array(buffer, at, count);
  }
}

function swap(bytes: Uint8Array, width: number): void {
  for (let at = 0; at + width <= bytes.length; at += width) bytes.subarray(at, at + width).reverse();
}

/** IEEE 754 binary16 to a number. */
function fromHalf(bits: number): number {
  const sign = bits & 0x8000 ? -1 : 1;
  const exponent = (bits >> 10) & 31;
  const fraction = bits & 1023;
  if (exponent === 0) return sign * fraction * 2 ** -24;
  if (exponent === 31) return fraction === 0 ? sign * Number.POSITIVE_INFINITY : Number.NaN;
  return sign * (1 + fraction / 1024) * 2 ** (exponent - 15);
}
