import { zlibSync } from 'fflate';

export type Sample = 'uint8' | 'uint16' | 'int8' | 'int16' | 'int32' | 'uint32' | 'float32' | 'float64';

/** Values of one tag by TIFF type: 2 text, 3 short, 4 long, 12 double, 16 long of 64 bits. */
export interface Tag {
  readonly type: 2 | 3 | 4 | 12 | 16;
  readonly values: readonly number[] | string;
  /** Lies about the number of values. */
  readonly count?: number;
}

export interface TiffSpec {
  readonly width: number;
  readonly height: number;
  readonly values: ArrayLike<number>;
  readonly type?: Sample;
  readonly littleEndian?: boolean;
  readonly big?: boolean;
  readonly tile?: readonly [number, number];
  readonly rowsPerStrip?: number;
  readonly deflate?: boolean;
  readonly place?: readonly [west: number, north: number, cellWidth: number, cellHeight: number];
  readonly keys?: readonly (readonly [number, number | string | readonly number[]])[];
  /** Added to, put in place of, or (null) left out of the usual tags. */
  readonly tags?: Readonly<Record<number, Tag | null>>;
  readonly overviews?: readonly TiffSpec[];
  /** Where the last directory says that the next one lies: a number, or the first directory again. */
  readonly next?: number | 'first';
}

const bytesOf: Record<Sample, number> = {
  uint8: 1,
  int8: 1,
  uint16: 2,
  int16: 2,
  int32: 4,
  uint32: 4,
  float32: 4,
  float64: 8,
};
const typeBytes: Record<number, number> = { 2: 1, 3: 2, 4: 4, 12: 8, 16: 8 };

/** UTM zone 31 N with heights in metres. */
export const utmMetres = [
  [1024, 1],
  [1025, 1],
  [3072, 32631],
  [4099, 9001],
] as const;

export const degreesMetres = [
  [1024, 2],
  [1025, 1],
  [2048, 4326],
  [4099, 9001],
] as const;

/** A TIFF file with everything in it that the specification says, right or wrong (TIFF 6.0, BigTIFF, GeoTIFF 1.1). */
export function tiffBytes(spec: TiffSpec): Uint8Array {
  const little = spec.littleEndian ?? true;
  const big = spec.big ?? false;
  const out: number[] = [];
  const digitsOf = (value: number, bytes: number): number[] => {
    const digits = Array.from({ length: bytes }, (_, i) => Number((BigInt(value) >> BigInt(8 * i)) & 255n));
    return little ? digits : digits.reverse();
  };
  const put = (value: number, bytes: number): void => {
    out.push(...digitsOf(value, bytes));
  };
  out.push(...(little ? [73, 73] : [77, 77]));
  put(big ? 43 : 42, 2);
  if (big) {
    put(8, 2);
    put(0, 2);
  }
  const word = big ? 8 : 4;
  let pointer = out.length;
  put(0, word);
  const patch = (at: number, value: number): void => {
    for (const [i, digit] of digitsOf(value, word).entries()) out[at + i] = digit;
  };
  let first = 0;
  for (const [i, image] of [spec, ...(spec.overviews ?? [])].entries()) {
    const blocks = blocksOf(image, little);
    const offsets = blocks.map((block) => {
      const at = out.length;
      for (const byte of block) out.push(byte);
      return at;
    });
    const tags = tagsOf(image, i > 0, blocks, offsets);
    const placed = tags.map(([tag, { type, values, count }]) => {
      const bytes = valueBytes(type, values, little);
      const at = out.length;
      if (bytes.length > word) out.push(...bytes);
      return { tag, type, count: count ?? bytes.length / typeBytes[type], bytes, at };
    });
    const directory = out.length;
    if (i === 0) first = directory;
    patch(pointer, directory);
    put(placed.length, big ? 8 : 2);
    for (const { tag, type, count, bytes, at } of placed) {
      put(tag, 2);
      put(type, 2);
      put(count, word);
      if (bytes.length > word) put(at, word);
      else for (let k = 0; k < word; k++) out.push(bytes[k] ?? 0);
    }
    pointer = out.length;
    put(0, word);
  }
  if (spec.next !== undefined) patch(pointer, spec.next === 'first' ? first : spec.next);
  return Uint8Array.from(out);
}

function tagsOf(
  spec: TiffSpec,
  overview: boolean,
  blocks: readonly Uint8Array[],
  offsets: number[],
): [number, Tag][] {
  const type = spec.type ?? 'float32';
  const long = (...values: number[]): Tag => ({ type: 4, values });
  const short = (...values: number[]): Tag => ({ type: 3, values });
  const tags = new Map<number, Tag>([
    [254, long(overview ? 1 : 0)],
    [256, long(spec.width)],
    [257, long(spec.height)],
    [258, short(8 * bytesOf[type])],
    [259, short(spec.deflate ? 8 : 1)],
    [262, short(1)],
    [277, short(1)],
    [339, short(type.startsWith('float') ? 3 : type.startsWith('int') ? 2 : 1)],
    [spec.tile ? 324 : 273, long(...offsets)],
    [spec.tile ? 325 : 279, long(...blocks.map((block) => block.length))],
  ]);
  if (spec.tile) {
    tags.set(322, short(spec.tile[0]));
    tags.set(323, short(spec.tile[1]));
  } else tags.set(278, long(spec.rowsPerStrip ?? spec.height));
  if (!overview) {
    const [west, north, cellWidth, cellHeight] = spec.place ?? [500000, 5600000, 2, 2];
    tags.set(33550, { type: 12, values: [cellWidth, cellHeight, 0] });
    tags.set(33922, { type: 12, values: [0, 0, 0, west, north, 0] });
    for (const [tag, value] of keyTags(spec.keys ?? utmMetres)) tags.set(tag, value);
  }
  for (const [tag, value] of Object.entries(spec.tags ?? {})) {
    if (value === null) tags.delete(Number(tag));
    else tags.set(Number(tag), value);
  }
  return [...tags].sort((a, b) => a[0] - b[0]);
}

function keyTags(keys: NonNullable<TiffSpec['keys']>): [number, Tag][] {
  const directory = [1, 1, 1, keys.length];
  const doubles: number[] = [];
  let text = '';
  for (const [key, value] of keys) {
    if (typeof value === 'string') {
      directory.push(key, 34737, value.length + 1, text.length);
      text += `${value}|`;
    } else if (typeof value === 'number' && Number.isInteger(value) && value >= 0 && value < 65536) {
      directory.push(key, 0, 1, value);
    } else {
      const values = typeof value === 'number' ? [value] : value;
      directory.push(key, 34736, values.length, doubles.length);
      doubles.push(...values);
    }
  }
  const tags: [number, Tag][] = [[34735, { type: 3, values: directory }]];
  if (doubles.length > 0) tags.push([34736, { type: 12, values: doubles }]);
  if (text !== '') tags.push([34737, { type: 2, values: text }]);
  return tags;
}

function valueBytes(type: Tag['type'], values: Tag['values'], little: boolean): number[] {
  if (typeof values === 'string') return [...values, '\0'].map((letter) => letter.charCodeAt(0));
  const view = new DataView(new ArrayBuffer(values.length * typeBytes[type]));
  for (const [i, value] of values.entries()) {
    if (type === 3) view.setUint16(2 * i, value, little);
    else if (type === 4) view.setUint32(4 * i, value, little);
    else if (type === 12) view.setFloat64(8 * i, value, little);
    else view.setBigUint64(8 * i, BigInt(value), little);
  }
  return [...new Uint8Array(view.buffer)];
}

function blocksOf(spec: TiffSpec, little: boolean): Uint8Array[] {
  const [blockWidth, blockHeight] = spec.tile ?? [spec.width, spec.rowsPerStrip ?? spec.height];
  const type = spec.type ?? 'float32';
  const size = bytesOf[type];
  const blocks: Uint8Array[] = [];
  for (let top = 0; top < spec.height; top += blockHeight) {
    for (let left = 0; left < spec.width; left += blockWidth) {
      const rows = spec.tile ? blockHeight : Math.min(blockHeight, spec.height - top);
      const view = new DataView(new ArrayBuffer(blockWidth * rows * size));
      for (let row = 0; row < rows; row++) {
        for (let column = 0; column < blockWidth; column++) {
          if (top + row >= spec.height || left + column >= spec.width) continue;
          const value = spec.values[(top + row) * spec.width + left + column];
          setSample(view, (row * blockWidth + column) * size, type, value, little);
        }
      }
      const bytes = new Uint8Array(view.buffer);
      blocks.push(spec.deflate ? zlibSync(bytes) : bytes);
    }
  }
  return blocks;
}

function setSample(view: DataView, at: number, type: Sample, value: number, little: boolean): void {
  if (type === 'uint8') view.setUint8(at, value);
  else if (type === 'int8') view.setInt8(at, value);
  else if (type === 'uint16') view.setUint16(at, value, little);
  else if (type === 'int16') view.setInt16(at, value, little);
  else if (type === 'uint32') view.setUint32(at, value, little);
  else if (type === 'int32') view.setInt32(at, value, little);
  else if (type === 'float32') view.setFloat32(at, value, little);
  else view.setFloat64(at, value, little);
}
