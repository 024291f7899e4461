import { sha256Bytes } from '../statistics/index.js';

/**
 * SHA-256 of a text in UTF-8, as base64: the page's content security policy names its one script and one style by it.
 * @example
 * ```ts
 * sha256Base64('abc') // => 'ungWv48Bz+pBQUDeXa4iI7ADYaOWF3qctBD/YfIAFa0='
 * ```
 */
export const sha256Base64 = (text: string): string =>
  btoa(String.fromCharCode(...sha256Bytes(new TextEncoder().encode(text))));
