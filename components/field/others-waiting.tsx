'use client';

import { useSnapshot } from './use-device';
import { useNow } from './use-now';
import { entriesWords, waitingWords, waitsWords } from './waiting-words';

/** Whose work waits on this shared device, how much and how old: it is sent only once they sign in themselves. */
export function OthersWaiting() {
  const { people, person } = useSnapshot();
  const now = useNow();
  const others = people.filter((one) => one.id !== person?.id && waitingWords(one.waiting) !== '');
  if (others.length === 0) return null;
  return (
    <section className="grid gap-1 border border-rule bg-sheet p-3">
      <h2 className="font-label font-semibold">Work of others on this device</h2>
      <ul>
        {others.map(({ id, name, waiting }) => (
          <li key={id}>
            {name}: {waitsWords(waiting, now)}
          </li>
        ))}
      </ul>
      <p className="text-label text-pencil">It is kept, and sent only when they sign in here themselves.</p>
    </section>
  );
}

/** What others recorded of this pour on this very device and nobody else can see yet. */
export function OthersOnPour({ pourId }: { pourId: string }) {
  const { people, person } = useSnapshot();
  const others = people.filter((one) => one.id !== person?.id && (one.waiting.pours[pourId] ?? 0) > 0);
  if (others.length === 0) return null;
  return (
    <section className="grid gap-1 border border-l-[6px] border-rule bg-sheet p-3">
      <h2 className="font-label font-semibold">Not on this sheet yet</h2>
      <ul>
        {others.map(({ id, name, waiting }) => (
          <li key={id}>
            {entriesWords(waiting.pours[pourId] ?? 0)} of this pour by {name}
          </li>
        ))}
      </ul>
      <p className="text-label text-pencil">
        Recorded on this device, and seen once they sign in and it is sent. Ask them what they have read
        before you read it again.
      </p>
    </section>
  );
}
