import { OverbrimError } from '../core/error.ts';

/**
 * SHA-256 (FIPS 180-4) in hex, by WebCrypto.
 * @throws OverbrimError `unsupported` where WebCrypto is missing (a page not served by https).
 */
export async function sha256Hex(bytes: Uint8Array): Promise<string> {
  const subtle = globalThis.crypto?.subtle;
  if (!subtle) {
    throw new OverbrimError(
      'unsupported',
      'This page has no WebCrypto to hash the terrain with; serve it by https or from localhost.',
    );
  }
  const digest = new Uint8Array(await subtle.digest('SHA-256', bytes as Uint8Array<ArrayBuffer>));
  return Array.from(digest, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

export function sha256OfText(text: string): Promise<string> {
  return sha256Hex(new TextEncoder().encode(text));
}
