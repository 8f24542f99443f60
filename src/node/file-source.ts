import { type FileHandle, open } from 'node:fs/promises';
import { basename } from 'node:path';
import { OverbrimError } from '../core/error.ts';
import type { ByteSource } from '../raster/byte-source.ts';

/**
 * Opens a file on disk for reading by ranges.
 * @throws OverbrimError `unreadable` when there is no such file, it is a folder, or it may not be read.
 */
export async function fileSource(path: string): Promise<ByteSource> {
  const handle = await opened(path);
  const stat = await handle.stat();
  if (!stat.isFile()) {
    await handle.close();
    throw new OverbrimError('unreadable', `${path} is not a file; give the path of an elevation file.`);
  }
  return {
    name: basename(path),
    size: stat.size,
    async read(offset, length) {
      const wanted = Math.max(0, Math.min(length, stat.size - offset));
      const bytes = new Uint8Array(wanted);
      let filled = 0;
      while (filled < wanted) {
        const { bytesRead } = await handle.read(bytes, filled, wanted - filled, offset + filled);
        if (bytesRead === 0) break;
        filled += bytesRead;
      }
      return bytes.subarray(0, filled);
    },
    close: () => handle.close(),
  };
}

async function opened(path: string): Promise<FileHandle> {
  try {
    return await open(path, 'r');
  } catch (cause) {
    const code = cause instanceof Error && 'code' in cause ? cause.code : '';
    const why =
      code === 'ENOENT'
        ? 'does not exist; check the path'
        : code === 'EACCES'
          ? 'may not be read; check its permissions'
          : `could not be opened (${String(code)}); check the path`;
    throw new OverbrimError('unreadable', `${path} ${why}.`, { cause });
  }
}
