import type { TextOut } from './text-out.js';

/**
 * Writes rows of which most cells are those of the row before: section, bed and taxon stay the same from shell to shell, and
 * so does all that names a field. What has not changed is copied from the row before in one piece, where that still lies in
 * what is gathered.
 *
 * A row is `begin`, `same` for each of its cells in order, each that is not the same written by the caller, and `end`.
 */
export class LikeLast {
  private readonly values: unknown[];
  /** Where the value of each cell began in the last row, and where that row ended. */
  private readonly starts: Int32Array;
  private ended = 0;
  /** The piece of output that holds the last row whole; -1 where none does. */
  private piece = -1;
  /** The part of the last row from which on nothing was copied; -1 where this row is written anew. */
  private from = -1;

  /**
   * @param leads What stands before each cell: a key, a comma.
   * @param tail What ends a row.
   */
  constructor(
    private readonly out: TextOut,
    private readonly leads: readonly Uint8Array[],
    private readonly tail: Uint8Array,
  ) {
    this.values = leads.map(() => undefined);
    this.starts = new Int32Array(leads.length);
  }

  begin(): void {
    const { out } = this;
    out.need(ROW);
    const whole = this.piece === out.piece;
    this.from = whole ? this.starts[0] - this.leads[0].length : -1;
    this.piece = out.piece;
  }

  /** Whether cell `i` is as in the row before, and so is written already; else the caller writes it now. */
  same(i: number, value: unknown): boolean {
    const { out, leads, starts } = this;
    const own = Array.isArray(value) && value.length === 0 ? NONE : value;
    // what was just written may have run over the last row; nothing of it is waiting to be copied then
    if (this.piece !== out.piece) this.from = -1;
    if (this.from < 0) out.bytes(leads[i]);
    else {
      if (own === this.values[i]) {
        starts[i] += out.at - this.from;
        return true;
      }
      out.again(this.from, starts[i]);
      this.from = i + 1 < leads.length ? starts[i + 1] - leads[i + 1].length : this.ended - this.tail.length;
    }
    this.values[i] = own;
    starts[i] = out.at;
    return false;
  }

  end(): void {
    const { out } = this;
    if (this.from < 0 || this.piece !== out.piece) out.bytes(this.tail);
    else out.again(this.from, this.ended);
    this.ended = out.at;
    // a long row may have gone out in parts
    if (this.piece !== out.piece) this.piece = -1;
  }
}

/** Bytes that hold most rows, so that they begin and end in one piece. */
const ROW = 4096;

/** Stands for any empty list. */
const NONE = Symbol('empty list');
