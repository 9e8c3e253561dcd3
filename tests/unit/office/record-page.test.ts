import { describe, expect, it } from 'vitest';
import type { RecordLine } from '@/components/office/record-lines';
import { entryHref, recordPage, recordQuery } from '@/components/office/record-page';

const line = (seq: number, type: RecordLine['type'] = 'note'): RecordLine => ({
  id: `0193c000-0000-7000-8000-${String(seq).padStart(12, '0')}`,
  type,
  seq,
  hash: null,
  wording: { title: `Entry ${seq}`, lines: [] },
  by: 'Noor Valdés',
  authorId: 'noor',
  role: 'inspector',
  recordedAt: '2026-12-01T12:00:00Z',
  receivedAt: null,
  clockDoubtful: false,
  ofProject: false,
  amendments: [],
  correctable: null,
});
const record = (count: number) => Array.from({ length: count }, (_, index) => line(index + 1));
const seqs = (lines: RecordLine[]) => lines.map(({ seq }) => seq);

describe('a page of the record', () => {
  it('shows the newest first, and says where the earlier ones begin', () => {
    const page = recordPage(record(7), {}, 3);
    expect(seqs(page.lines)).toEqual([7, 6, 5]);
    expect(page.earlier).toBe(5);
    expect(page.total).toBe(7);
  });

  it('leads through every entry once, and ends', () => {
    const seen: (number | null)[] = [];
    let before: number | undefined;
    for (let turn = 0; turn < 10; turn += 1) {
      const page = recordPage(record(7), { before }, 3);
      seen.push(...seqs(page.lines));
      if (page.earlier === null) break;
      before = page.earlier;
    }
    expect(seen).toEqual([7, 6, 5, 4, 3, 2, 1]);
  });

  it.each([
    [7, [7, 6, 5]],
    [4, [4, 3, 2]],
    [2, [4, 3, 2]],
    [1, [1]],
  ])('opens on the page that entry %i stands on', (seq, shown) => {
    const page = recordPage(record(7), { entry: line(seq).id }, 3);
    expect(seqs(page.lines)).toEqual(shown);
  });

  it('shows an entry that is asked for whatever part of the record was chosen', () => {
    const lines = [...record(4), line(5, 'reading')];
    expect(seqs(recordPage(lines, { part: 'readings' }, 3).lines)).toEqual([5]);
    expect(seqs(recordPage(lines, { part: 'readings', entry: line(2).id }, 3).lines)).toEqual([2, 1]);
  });

  it('begins at the newest where the entry is not in this record', () => {
    expect(seqs(recordPage(record(4), { entry: line(99).id }, 3).lines)).toEqual([4, 3, 2]);
    expect(recordQuery.parse({ entry: 'not an id' })).toEqual({});
  });

  it('is linked to by entry, and to the place on the page', () => {
    const { id } = line(3);
    expect(entryHref('pour-1', id)).toBe(`/pours/pour-1/record?entry=${id}#entry-${id}`);
  });
});
