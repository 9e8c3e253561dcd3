import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readMark, writeMark } from '@/lib/device/store/high-water-mark';

const ids = fc.stringMatching(/^[0-9a-f-]{12,36}$/);

describe('the mark kept in a cookie (SPEC 4)', () => {
  it('comes back as it was written, fits in a cookie, and never names an entry that did not wait', () => {
    fc.assert(
      fc.property(
        ids,
        ids,
        fc.uniqueArray(fc.nat(200_000), { maxLength: 400 }),
        fc.nat(1000),
        (storeId, deviceId, seqs, unsentPhotos) => {
          const made = Math.max(0, ...seqs);
          const unsent = seqs.length;
          const text = writeMark({ storeId, deviceId, made, unsent, unsentSeqs: seqs, unsentPhotos });
          const mark = readMark(text);
          expect(text.length).toBeLessThan(1200);
          expect(text).toMatch(/^[\w.,-]*$/);
          expect(mark).toMatchObject({ storeId, deviceId, made, unsent, unsentPhotos });
          expect(mark?.unsentSeqs.every((seq) => seqs.includes(seq))).toBe(true);
          if (seqs.length < 100) expect(mark?.unsentSeqs.length).toBe(seqs.length);
        },
      ),
    );
  });

  it('holds a whole day of readings in a row', () => {
    const unsentSeqs = Array.from({ length: 10_000 }, (_, index) => index + 17);
    const mark = readMark(
      writeMark({ storeId: 'aa', deviceId: 'bb', made: 10_016, unsent: 10_000, unsentSeqs, unsentPhotos: 0 }),
    );
    expect(mark?.unsentSeqs).toEqual(unsentSeqs);
  });

  it.each(['', 'x', 'a.b', 'a.b.c.d.e', 'a.b.5.-1.', null])('takes %j for no mark', (text) => {
    expect(readMark(text)).toBeNull();
  });

  it('is read as an earlier version wrote it', () => {
    expect(readMark('aa.bb.5.1.5')).toMatchObject({ made: 5, unsentSeqs: [5], unsentPhotos: 0 });
  });

  it('does not fill the memory with a range that somebody wrote into the cookie', () => {
    expect(readMark('a.b.5.2.1-99999999999,7')?.unsentSeqs).toEqual([7]);
  });
});
