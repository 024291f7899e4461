/** One file within a zip archive. */
export interface ZipEntry {
  readonly name: string;
  /** 0: stored, 8: deflated. */
  readonly method: number;
  readonly packed: number;
  /** Size once unpacked, as the archive says. */
  readonly size: number;
  /** Where its local header starts. */
  readonly offset: number;
}

/**
 * The directory at the end of a zip archive (PKWARE APPNOTE 6.3.10, 4.3.12 and 4.3.16), without unpacking anything;
 * null when there is none, or when the archive needs the 64-bit form, which no .xlsx of a legal size does.
 */
export function zipEntries(bytes: Uint8Array): ZipEntry[] | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let end = bytes.length - 22;
  const lowest = Math.max(0, end - 65_535);
  while (end >= lowest && view.getUint32(end, true) !== 0x06054b50) end -= 1;
  if (end < lowest) return null;
  const count = view.getUint16(end + 10, true);
  let at = view.getUint32(end + 16, true);
  const entries: ZipEntry[] = [];
  for (let i = 0; i < count; i += 1) {
    if (at + 46 > bytes.length || view.getUint32(at, true) !== 0x02014b50) return null;
    const nameLength = view.getUint16(at + 28, true);
    entries.push({
      name: new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + nameLength)),
      method: view.getUint16(at + 10, true),
      packed: view.getUint32(at + 20, true),
      size: view.getUint32(at + 24, true),
      offset: view.getUint32(at + 42, true),
    });
    at += 46 + nameLength + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  return entries;
}

/**
 * The text of one entry. Unpacking stops at the size that the archive gives, so that a small file can't fill memory.
 *
 * @throws Error when the entry can't be unpacked or is larger than it says
 */
export async function zipText(bytes: Uint8Array, entry: ZipEntry): Promise<string> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const start = entry.offset + 30 + view.getUint16(entry.offset + 26, true) + view.getUint16(entry.offset + 28, true);
  const packed = bytes.subarray(start, start + entry.packed) as Uint8Array<ArrayBuffer>;
  if (entry.method === 0) return new TextDecoder().decode(packed);
  if (entry.method !== 8) throw new Error(`zip method ${entry.method}`);
  const reader = new Blob([packed]).stream().pipeThrough(new DecompressionStream('deflate-raw')).getReader();
  const decoder = new TextDecoder();
  let text = '';
  let size = 0;
  for (;;) {
    const { done, value } = await reader.read();
    if (done) return text + decoder.decode();
    size += value.length;
    if (size > entry.size) {
      await reader.cancel();
      throw new Error('larger than its size');
    }
    text += decoder.decode(value, { stream: true });
  }
}
