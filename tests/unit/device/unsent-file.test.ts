import { describe, expect, it } from 'vitest';
import { batchesOf, readUnsentFile } from '@/lib/device/unsent-file';
import { uuid } from '@/tests/stories/pour-story';

const entry = (project: number, deviceSeq: number) => ({
  id: uuid(project, deviceSeq),
  projectId: uuid(9, project),
  authorId: uuid(9, 7),
  type: 'note',
  deviceSeq,
  body: { text: 'kept as it was' },
});
const file = {
  format: 'cagewright-unsent',
  version: 1,
  person: { id: uuid(9, 7), name: 'Noor' },
  deviceId: uuid(9, 8),
  savedAt: '2026-12-01T07:00:00.000Z',
  entries: [entry(1, 1)],
  refused: [],
  notOnServer: [],
  photos: [],
};

describe('a file of what was not sent', () => {
  it('is read with each entry whole', () => {
    const read = readUnsentFile(JSON.stringify(file));
    expect(read.ok && read.file.entries).toEqual(file.entries);
  });

  it.each([
    ['cut short', JSON.stringify(file).slice(0, -20), /cut short/],
    ['something else', '{"rows":[]}', /not one that a device saved/],
    ['of a newer version', JSON.stringify({ ...file, version: 2 }), /newer version/],
    ['with an entry of nobody', JSON.stringify({ ...file, entries: [{ id: uuid(9, 1) }] }), /entries\.0/],
  ])('is refused in words when it is %s', (_how, text, words) => {
    const read = readUnsentFile(text);
    expect(read.ok ? '' : read.problem).toMatch(words);
  });

  it('goes out as a device sends: by project, in the order of recording, 500 at a time', () => {
    const many = Array.from({ length: 1100 }, (_, index) => entry(1, 1100 - index));
    const batches = batchesOf([...many, entry(2, 5)]);
    expect(batches.map((batch) => [batch.projectId, batch.entries.length])).toEqual([
      [uuid(9, 1), 500],
      [uuid(9, 1), 500],
      [uuid(9, 1), 100],
      [uuid(9, 2), 1],
    ]);
    const sent = batches.flatMap((batch) => batch.entries).filter((one) => one.projectId === uuid(9, 1));
    expect(sent.map((one) => one.deviceSeq)).toEqual(many.map((one) => one.deviceSeq).toReversed());
  });
});
