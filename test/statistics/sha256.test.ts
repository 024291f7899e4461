import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sha256Bytes, sha256Here } from '../../src/statistics/sha256.js';

const judge = (bytes: Uint8Array) => [...createHash('sha256').update(bytes).digest()];

describe('sha256Here', () => {
  it('agrees with another implementation on any bytes, around every border of a block', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 200 }), (bytes) => {
        expect([...sha256Here(bytes)]).toEqual(judge(bytes));
      }),
      { numRuns: 50 },
    );
    for (const length of [0, 1, 54, 55, 56, 63, 64, 65, 119, 120, 128]) {
      const bytes = new Uint8Array(length).fill(0x5a);
      expect([...sha256Here(bytes)], `${length} bytes`).toEqual(judge(bytes));
    }
  });

  it('reads a part of a larger buffer as that part alone', () => {
    const whole = Uint8Array.from({ length: 100 }, (_, i) => i);
    expect([...sha256Here(whole.subarray(10, 40))]).toEqual(judge(whole.slice(10, 40)));
  });
});

describe('sha256Bytes', () => {
  it('is the same with and without help of the platform', () => {
    const bytes = Uint8Array.from({ length: 300 }, (_, i) => (7 * i) % 256);
    expect(sha256Bytes(bytes.subarray(3))).toEqual(sha256Here(bytes.subarray(3)));
    // as in a page
    const { process } = globalThis;
    Reflect.set(globalThis, 'process', undefined);
    let alone: Uint8Array;
    try {
      alone = sha256Bytes(bytes);
    } finally {
      globalThis.process = process;
    }
    expect([...alone]).toEqual(judge(bytes));
  });
});
