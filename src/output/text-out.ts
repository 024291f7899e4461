const encoder = new TextEncoder();

/** Bytes of a text that is written again and again, for {@link TextOut.bytes}. */
export const utf8 = (text: string): Uint8Array => encoder.encode(text);

/** Bytes gathered before they are given on. */
const ROOM = 128 * 1024;

/** Characters up to which a text is copied here; longer ones are worth a call of the encoder. */
const SHORT = 48;

/** Bytes up to which a loop copies faster than a call. */
const FEW = 32;

/**
 * Text on its way to a file, gathered as UTF-8 bytes and given on in pieces of some hundred kilobytes. A survey has millions
 * of cells; as strings, each would be made, joined, copied and thrown away.
 */
export class TextOut {
  /** What is gathered: bytes 0 to `at`. Writers of numbers put theirs here after asking for room. */
  room = new Uint8Array(ROOM);
  at = 0;
  /** Number of the piece that is gathered: what is in `room` before `at` stays there until this changes. */
  piece = 0;

  /** @param give Takes the bytes; they are good until it returns. */
  constructor(private readonly give: (bytes: Uint8Array) => void) {}

  /** Sees to it that so many bytes fit behind `at`. */
  need(bytes: number): void {
    if (this.at + bytes > this.room.length) this.flush();
  }

  /** One character below U+0080. */
  ascii(code: number): void {
    this.need(1);
    this.room[this.at++] = code;
  }

  /** Bytes that were encoded before, some hundred at most. */
  bytes(bytes: Uint8Array): void {
    this.need(bytes.length);
    const { room, at } = this;
    for (let i = 0; i < bytes.length; i++) room[at + i] = bytes[i];
    this.at = at + bytes.length;
  }

  /** Bytes that stand in this piece already, from one place in it to another; a row of a table at most. */
  again(from: number, to: number): void {
    this.need(to - from);
    const { room, at } = this;
    if (to - from > FEW) room.copyWithin(at, from, to);
    else for (let i = from; i < to; i++) room[at + i - from] = room[i];
    this.at = at + to - from;
  }

  text(text: string): void {
    if (text.length <= SHORT && this.copied(text)) return;
    // three bytes are the most that a UTF-16 unit takes
    const most = 3 * text.length;
    this.need(most);
    if (most > ROOM) this.give(encoder.encode(text));
    else this.at += encoder.encodeInto(text, this.room.subarray(this.at)).written;
  }

  /** A text as JSON has it, in its quotes. */
  json(text: string): void {
    // room for all of it now: what is begun here must still be here to be taken back
    this.need(SHORT + 2);
    const before = this.at;
    if (text.length <= SHORT) {
      this.ascii(QUOTE);
      if (this.copied(text) && !this.escaped(before + 1)) {
        this.ascii(QUOTE);
        return;
      }
      this.at = before;
    }
    this.text(JSON.stringify(text));
  }

  /** Gives on what is left. */
  flush(): void {
    if (this.at > 0) this.give(this.room.subarray(0, this.at));
    this.at = 0;
    this.piece++;
  }

  /** Copies a short text of characters below U+0080; false, and nothing copied, where others are in it. */
  private copied(text: string): boolean {
    this.need(text.length);
    const { room, at } = this;
    for (let i = 0; i < text.length; i++) {
      const code = text.charCodeAt(i);
      if (code > 127) return false;
      room[at + i] = code;
    }
    this.at = at + text.length;
    return true;
  }

  /** Whether JSON escapes anything in what was copied from there on. */
  private escaped(from: number): boolean {
    const { room, at } = this;
    for (let i = from; i < at; i++) if (room[i] < 32 || room[i] === QUOTE || room[i] === BACKSLASH) return true;
    return false;
  }
}

const QUOTE = 34;
const BACKSLASH = 92;

/**
 * What a writer writes, as one string.
 * @example
 * textOf((out) => out.json('a "quote"')) // => '"a \\"quote\\""'
 */
export function textOf(write: (out: TextOut) => void): string {
  const decoder = new TextDecoder('utf-8', { ignoreBOM: true });
  let text = '';
  const out = new TextOut((bytes) => {
    text += decoder.decode(bytes, { stream: true });
  });
  write(out);
  out.flush();
  return text + decoder.decode();
}
