import { describe, expect, it } from 'vitest';
import type { StoredEntry } from '@/lib/inspection/wire';
import { uuid } from '@/tests/stories/pour-story';
import { violations, type History, type OnPhone } from './world/check-history';
import { contentOf } from './world/model-server';
import { inspector, note, pourId, projectId, superintendent } from './world/site';

const COUNT = 2_000;

/** A month's work as it should end: all of it on the server, once, in one chain, and nothing left on the phone. */
function month() {
  const server: StoredEntry[] = Array.from({ length: COUNT }, (_, index) => ({
    ...{ id: uuid(77, index + 1), projectId, pourId, type: 'note', v: 1, planRevision: 1 },
    ...{ authorId: inspector.id, authorRole: 'inspector', deviceId: uuid(78, 1), deviceSeq: index + 1 },
    ...{ recordedAt: '2026-11-01T07:00:00.000Z', clockOffsetMs: 0, seenSeq: 0, body: note(`no. ${index}`) },
    ...{ seq: index + 1, receivedAt: '2026-12-01T07:00:00.000Z' },
    ...{ prevHash: index === 0 ? null : `hash ${index}`, hash: `hash ${index + 1}` },
  }));
  const history: History = {
    recorded: new Map(server.map((one) => [one.id, { content: contentOf(one), phone: 'a', poison: false }])),
  };
  const phone: OnPhone = { name: 'a', waiting: [], refused: [] };
  return { history, server, phones: [phone], secondDevice: server.map((one) => one.id) };
}
type Month = ReturnType<typeof month>;
const middle = COUNT / 2;

/** One month with something done to the entry in its middle. */
function broken(change: (run: Month, victim: StoredEntry) => void): Month {
  const run = month();
  const victim = run.server[middle];
  if (!victim) throw new Error('no such entry');
  change(run, victim);
  return run;
}
/** Links the record anew and lets the other device have it, so that only what was done to the record is to be seen. */
function sealAgain(run: Month, server: StoredEntry[]): void {
  let before: string | null = null;
  run.server = server.map((one) => {
    const linked: StoredEntry = { ...one, prevHash: before };
    before = one.hash;
    return linked;
  });
  run.secondDevice = run.server.map((one) => one.id);
}
const waits = (run: Month, id: string) => (run.phones = [{ name: 'a', waiting: [id], refused: [] }]);
const refuses = (run: Month, id: string, sentence: string) =>
  (run.phones = [{ name: 'a', waiting: [], refused: [{ id, sentence }] }]);
const without = (run: Month) => sealAgain(run, run.server.toSpliced(middle, 1));

const cases: [what: string, run: Month, found: RegExp][] = [
  ['one that is lost', broken(without), /^lost: /],
  [
    'one that is doubled',
    broken((run, victim) => sealAgain(run, run.server.toSpliced(middle, 0, { ...victim, hash: 'other' }))),
    /^doubled: .* is on the server 2 times$/,
  ],
  [
    'one in another person’s name',
    broken((run, victim) =>
      sealAgain(run, run.server.toSpliced(middle, 1, { ...victim, authorId: superintendent.id })),
    ),
    /^changed: /,
  ],
  [
    'one that nobody recorded',
    broken((run, victim) => sealAgain(run, [...run.server, { ...victim, id: uuid(79, 1), hash: 'other' }])),
    /^invented: /,
  ],
  [
    'one that was never sent',
    broken((run, victim) => {
      without(run);
      waits(run, victim.id);
    }),
    /^never sent/,
  ],
  [
    'one that was refused for nothing',
    broken((run, victim) => {
      without(run);
      refuses(run, victim.id, 'No.');
    }),
    /^refused, though nothing is wrong/,
  ],
  ['a chain that was cut', broken((_run, victim) => (victim.prevHash = 'other')), /^chain broken/],
  [
    'a device that sees one less',
    broken((run) => (run.secondDevice = run.secondDevice.toSpliced(middle, 1))),
    /^another device sees another set/,
  ],
];

describe('the checker of histories', () => {
  it('finds nothing where nothing is wrong', () => {
    expect(violations(month())).toEqual([]);
  });

  it.each(cases)('finds %s among thousands, and nothing else', (_what, run, found) => {
    expect(violations(run)).toEqual([expect.stringMatching(found)]);
  });
});
