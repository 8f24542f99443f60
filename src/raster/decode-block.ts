import { unzlibSync } from 'fflate';
import type { ZSTDDecoder } from 'zstddec';
import { OverbrimError } from '../core/error.ts';
import { decodeLzw } from './lzw.ts';
import { decodePackBits } from './pack-bits.ts';
import { undoPredictor } from './undo-predictor.ts';

/** Methods read here, by the number in tag 259, with the most bytes that one compressed byte can unfold to. */
export const readableCompressions: ReadonlyMap<number, number> = new Map([
  [1, 1],
  [5, 2731],
  [8, 1033],
  [32946, 1033],
  [32773, 64],
  [50000, 65536],
]);

/** Names of the numbers, for messages. */
export const compressionNames: Record<number, string> = {
  2: 'fax',
  3: 'fax',
  4: 'fax',
  6: 'old JPEG',
  7: 'JPEG',
  34712: 'JPEG 2000',
  34887: 'LERC',
  34925: 'LZMA',
  50001: 'WebP',
  50002: 'JPEG XL',
};

export interface BlockFormat {
  readonly name: string;
  readonly compression: number;
  readonly predictor: number;
  readonly rowCells: number;
  readonly sampleBytes: number;
  readonly littleEndian: boolean;
}

/**
 * Unpacks one block into `expected` bytes in the file's byte order. No method may unfold beyond that.
 * @throws OverbrimError `unreadable` when the block is damaged or yields fewer bytes.
 */
export async function decodeBlock(
  data: Uint8Array,
  format: BlockFormat,
  expected: number,
): Promise<Uint8Array> {
  let bytes: Uint8Array;
  try {
    bytes = await unpacked(data, format.compression, expected);
  } catch (cause) {
    if (cause instanceof OverbrimError) throw cause;
    throw damaged(format.name, cause);
  }
  if (bytes.length < expected) throw damaged(format.name);
  const block = bytes.subarray(0, expected);
  if (format.predictor !== 1) {
    undoPredictor(block, format.predictor, format.rowCells, format.sampleBytes, format.littleEndian);
  }
  return block;
}

async function unpacked(data: Uint8Array, compression: number, expected: number): Promise<Uint8Array> {
  switch (compression) {
    case 1:
      return data.slice();
    case 5:
      return decodeLzw(data, expected);
    case 32773:
      return decodePackBits(data, expected);
    case 50000: {
      const decoder = await zstandard();
      // With the length given, the library unpacks into that much memory and no more.
      return decoder.decode(data, expected);
    }
    default:
      // With a buffer given, the library never grows it.
      return unzlibSync(data, { out: new Uint8Array(expected) });
  }
}

/** The decoder is WebAssembly, which some pages forbid and which may not have been shipped beside the script. */
async function zstandard(): Promise<ZSTDDecoder> {
  try {
    const { ZSTDDecoder: Decoder } = await import('zstddec');
    const decoder = new Decoder();
    await decoder.init();
    return decoder;
  } catch (cause) {
    const why = cause instanceof Error ? cause.message : String(cause);
    throw new OverbrimError(
      'unsupported',
      `Zstandard compression cannot be read here (${why}); allow WebAssembly in the page's policy, or give the file deflate compression.`,
      { cause },
    );
  }
}

function damaged(name: string, cause?: unknown): OverbrimError {
  return new OverbrimError(
    'unreadable',
    `A block of ${name} cannot be unpacked to its full length; the file is truncated or damaged, so fetch it again.`,
    { cause },
  );
}
