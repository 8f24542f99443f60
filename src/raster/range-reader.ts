import { OverbrimError } from '../core/error.ts';
import type { ByteSource } from './byte-source.ts';
import { stopIfCancelled } from './cancel.ts';
import { sha256Hex, sha256OfText } from './hash.ts';

const chunkBytes = 65536;

/**
 * Reads exact byte ranges of one source, refuses those that lie outside it, and keeps a log of what was read.
 * Small reads are served from 64 kB chunks, so that a directory costs one or two requests.
 */
export class RangeReader {
  readonly name: string;
  #source: ByteSource;
  readonly #signal: AbortSignal | undefined;
  readonly #chunks = new Map<number, Uint8Array>();
  readonly #log = new Map<string, string>();
  #whole = false;

  constructor(source: ByteSource, signal?: AbortSignal) {
    this.name = source.name;
    this.#source = source;
    this.#signal = signal;
  }

  get size(): number | null {
    return this.#source.size;
  }

  /** From now on reads come from these bytes, the whole of the source. */
  useWhole(source: ByteSource): void {
    this.#source = source;
    this.#whole = true;
    this.#chunks.clear();
  }

  /**
   * Exactly `length` bytes from `offset`; `what` names them in messages.
   * @throws OverbrimError `unreadable` when they lie outside the file or the file ends early.
   */
  async bytes(offset: number, length: number, what: string): Promise<Uint8Array> {
    stopIfCancelled(this.#signal);
    if (!(Number.isSafeInteger(offset) && Number.isSafeInteger(length) && offset >= 0 && length >= 0)) {
      throw this.outside(offset, length, what);
    }
    const size = this.#source.size;
    if (size !== null && offset + length > size) throw this.outside(offset, length, what);
    const bytes = length < chunkBytes ? await this.#small(offset, length) : await this.#read(offset, length);
    if (bytes.length < length) throw this.outside(offset, length, what);
    return bytes;
  }

  /** The same, and its hash goes into the log, unless the whole file is known. */
  async logged(offset: number, length: number, what: string): Promise<Uint8Array> {
    const bytes = await this.bytes(offset, length, what);
    if (!this.#whole) this.#log.set(`${offset}+${length}`, await sha256Hex(bytes));
    return bytes;
  }

  /** SHA-256 over the list of logged ranges with the hash of each, in the order of the file. */
  rangesHash(): Promise<string> {
    const lines = [...this.#log].map(([range, hash]) => ({
      at: Number.parseInt(range, 10),
      line: `${range} ${hash}`,
    }));
    lines.sort((a, b) => a.at - b.at || (a.line < b.line ? -1 : 1));
    return sha256OfText(lines.map(({ line }) => line).join('\n'));
  }

  outside(offset: number, length: number, what: string): OverbrimError {
    const size = this.#source.size;
    return new OverbrimError(
      'unreadable',
      `${this.name} has ${size === null ? 'fewer' : size} bytes, but ${what} should be ${length} bytes from byte ` +
        `${offset} on; the file is truncated or damaged, so fetch it again.`,
    );
  }

  #read(offset: number, length: number): Promise<Uint8Array> {
    return this.#source.read(offset, length, this.#signal);
  }

  async #small(offset: number, length: number): Promise<Uint8Array> {
    const out = new Uint8Array(length);
    let filled = 0;
    while (filled < length) {
      const at = offset + filled;
      const chunk = await this.#chunk(Math.floor(at / chunkBytes));
      const part = chunk.subarray(at % chunkBytes, (at % chunkBytes) + length - filled);
      if (part.length === 0) break;
      out.set(part, filled);
      filled += part.length;
    }
    return out.subarray(0, filled);
  }

  async #chunk(number: number): Promise<Uint8Array> {
    const held = this.#chunks.get(number);
    if (held) return held;
    const chunk = await this.#read(number * chunkBytes, chunkBytes);
    if (this.#chunks.size >= 64) this.#chunks.delete(this.#chunks.keys().next().value ?? 0);
    this.#chunks.set(number, chunk);
    return chunk;
  }
}
