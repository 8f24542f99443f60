/** Bytes that can be read by ranges: a file, a Blob, a URL, or memory. */
export interface ByteSource {
  /** For people, in messages. */
  readonly name: string;
  /** Length in bytes; null while it is not known (a URL before its first answer). */
  readonly size: number | null;
  /** Bytes from `offset` on, `length` of them; fewer only where the data ends. */
  read(offset: number, length: number, signal?: AbortSignal): Promise<Uint8Array>;
  /** Gives back what the source holds open. */
  close?(): Promise<void>;
}

/** Bytes that are in memory already. */
export function memorySource(name: string, bytes: Uint8Array): ByteSource {
  return {
    name,
    size: bytes.length,
    read: async (offset, length) => bytes.subarray(offset, offset + length),
  };
}
