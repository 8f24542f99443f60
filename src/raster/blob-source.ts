import { OverbrimError } from '../core/error.ts';
import type { ByteSource } from './byte-source.ts';

/**
 * Reads a Blob or File, as a file chooser or a drop gives it, piece by piece.
 * @throws OverbrimError `unreadable` when the browser no longer lets it be read.
 */
export function blobSource(
  blob: Blob,
  name: string = 'name' in blob ? String(blob.name) : 'blob',
): ByteSource {
  return {
    name,
    size: blob.size,
    async read(offset, length) {
      try {
        return new Uint8Array(await blob.slice(offset, offset + length).arrayBuffer());
      } catch (cause) {
        throw new OverbrimError(
          'unreadable',
          `${name} can no longer be read; it was moved or changed, so choose it again.`,
          { cause },
        );
      }
    },
  };
}
