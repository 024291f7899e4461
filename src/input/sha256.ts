import { sha256Bytes } from '../statistics/index.js';

/**
 * SHA-256 of bytes in lower-case hexadecimal: by the platform's own Web Crypto, and by ours in a page that has none
 * because it was not sent over a secure line.
 */
export async function sha256(bytes: Uint8Array): Promise<string> {
  const subtle: SubtleCrypto | undefined = globalThis.crypto?.subtle;
  const digest = subtle
    ? new Uint8Array(await subtle.digest('SHA-256', bytes as Uint8Array<ArrayBuffer>))
    : sha256Bytes(bytes);
  return Array.from(digest, (byte) => byte.toString(16).padStart(2, '0')).join('');
}
