import { OverbrimError } from '../core/error.ts';
import type { ByteSource } from './byte-source.ts';
import { cancelled } from './cancel.ts';

export interface UrlOptions {
  /** Milliseconds that one answer may take, its bytes included. Default 60,000. */
  readonly timeoutMs?: number;
  /** Largest file taken whole from a server that does not offer byte ranges. Default 256 MiB. */
  readonly wholeBytes?: number;
  /** For pages and tests that bring their own. */
  readonly fetch?: typeof fetch;
}

/**
 * Reads a file on a web server by byte ranges (RFC 9110, section 14). A server that answers with the whole file
 * instead is read once, up to `wholeBytes`.
 * Reading throws OverbrimError `unreadable` with the reason: not reached, forbidden, not found, too slow, changed
 * meanwhile; `too-large` without ranges above the limit; `cancelled`.
 */
export function urlSource(url: string, options: UrlOptions = {}): ByteSource {
  const timeoutMs = options.timeoutMs ?? 60_000;
  const wholeBytes = options.wholeBytes ?? 256 * 2 ** 20;
  const get = options.fetch ?? fetch;
  let size: number | null = null;
  let whole: Uint8Array | null = null;
  let version: string | null = null;

  async function read(offset: number, length: number, signal?: AbortSignal): Promise<Uint8Array> {
    if (whole) return whole.subarray(offset, offset + length);
    if (length === 0) return new Uint8Array(0);
    const slow = AbortSignal.timeout(timeoutMs);
    try {
      const response = await get(url, {
        headers: { Range: `bytes=${offset}-${offset + length - 1}` },
        signal: signal ? AbortSignal.any([signal, slow]) : slow,
      });
      return await answered(response, offset, length);
    } catch (cause) {
      if (cause instanceof OverbrimError) throw cause;
      if (signal?.aborted) throw cancelled(cause);
      if (slow.aborted) {
        throw unreadable(
          `did not answer within ${timeoutMs / 1000} s; try again or download the file first`,
          cause,
        );
      }
      throw unreadable(
        'could not be reached; check the address and the connection, or, when a page reads it, that the server allows other sites (CORS)',
        cause,
      );
    }
  }

  async function answered(response: Response, offset: number, length: number): Promise<Uint8Array> {
    const { status } = response;
    if (status === 416) {
      size = totalOf(response) ?? size;
      return new Uint8Array(0);
    }
    if (status === 401 || status === 403) {
      throw unreadable(
        `is forbidden (status ${status}); ask its owner for access or download the file first`,
      );
    }
    if (status === 404 || status === 410)
      throw unreadable(`does not exist (status ${status}); check the address`);
    if (status !== 200 && status !== 206) {
      throw unreadable(`failed with status ${status}; expected 206 (a byte range), so try again later`);
    }
    const tag = response.headers.get('etag') ?? response.headers.get('last-modified');
    if (version !== null && tag !== null && tag !== version) {
      throw unreadable('changed on the server while it was read; open it again');
    }
    version = tag ?? version;
    if (status === 206) {
      size = totalOf(response) ?? size;
      const bytes = new Uint8Array(await response.arrayBuffer());
      return bytes.length > length ? bytes.subarray(0, length) : bytes;
    }
    whole = await wholeOf(response);
    size = whole.length;
    return whole.subarray(offset, offset + length);
  }

  async function wholeOf(response: Response): Promise<Uint8Array> {
    const said = Number(response.headers.get('content-length') ?? 0);
    if (said > wholeBytes) throw tooLarge(`${said} bytes`);
    const parts: Uint8Array[] = [];
    let total = 0;
    const reader = response.body?.getReader();
    for (let step = await reader?.read(); step && !step.done; step = await reader?.read()) {
      total += step.value.length;
      if (total > wholeBytes) {
        await reader?.cancel();
        throw tooLarge(`more than ${wholeBytes} bytes`);
      }
      parts.push(step.value);
    }
    const bytes = new Uint8Array(total);
    let at = 0;
    for (const part of parts) {
      bytes.set(part, at);
      at += part.length;
    }
    return bytes;
  }

  function tooLarge(found: string): OverbrimError {
    return new OverbrimError(
      'too-large',
      `The server of ${url} offers no byte ranges and the file has ${found}; at most ${wholeBytes} are taken whole, ` +
        'so download the file and open it from disk.',
    );
  }

  function unreadable(why: string, cause?: unknown): OverbrimError {
    return new OverbrimError('unreadable', `${url} ${why}.`, { cause });
  }

  return {
    name: url.split(/[?#]/, 1)[0]?.split('/').pop() || url,
    get size() {
      return size;
    },
    read,
  };
}

/** The length after the slash in `Content-Range: bytes 0-99/1234`. */
function totalOf(response: Response): number | null {
  const total = /\/(\d+)$/.exec(response.headers.get('content-range') ?? '')?.[1];
  return total === undefined ? null : Number(total);
}
