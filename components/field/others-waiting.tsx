'use client';

import { useSnapshot } from './use-device';

/** Whose work waits on this shared device: it is sent only once they sign in themselves. */
export function OthersWaiting() {
  const { others = [] } = useSnapshot();
  if (others.length === 0) return null;
  return (
    <section className="grid gap-1 border border-rule bg-sheet p-3">
      <h2 className="font-label font-semibold">Work of others on this device</h2>
      <ul>
        {others.map((other) => (
          <li key={other.id}>
            {other.name}: {other.waiting} not sent
          </li>
        ))}
      </ul>
      <p className="text-label text-pencil">It is kept, and sent only when they sign in here themselves.</p>
    </section>
  );
}
