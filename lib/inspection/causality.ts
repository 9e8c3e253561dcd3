/** What is needed to tell whether one entry's author had seen another entry. */
export interface Placed {
  id: string;
  authorId: string;
  deviceId: string;
  deviceSeq: number;
  seq: number | null;
  seenSeq: number;
}

/**
 * Had the author of `later` seen `earlier` when recording? Either the server had given it out to them (seq within
 * seenSeq), or they made it themselves on the same device before.
 */
export function saw(later: Placed, earlier: Placed): boolean {
  if (later.id === earlier.id) return false;
  if (earlier.authorId === later.authorId && earlier.deviceId === later.deviceId)
    return earlier.deviceSeq < later.deviceSeq;
  return earlier.seq !== null && earlier.seq <= later.seenSeq;
}

/**
 * The facts about one thing that no other fact about it was recorded in sight of. One head: everybody agrees on what
 * was said last. More than one: people spoke without having heard each other.
 */
export function headsOf<T extends Placed>(facts: readonly T[]): T[] {
  if (facts.length < 2) return [...facts];
  // A fact is unseen unless its own device went on after it, or another device had fetched past it: how far each device
  // had got answers that for all of its facts at once.
  const devices: Reach[] = [];
  for (const fact of facts) {
    const reach = reachOf(devices, fact);
    if (!reach) {
      const { authorId, deviceId, deviceSeq, seenSeq } = fact;
      devices.push({ authorId, deviceId, deviceSeq, seenSeq });
      continue;
    }
    if (fact.deviceSeq > reach.deviceSeq) reach.deviceSeq = fact.deviceSeq;
    if (fact.seenSeq > reach.seenSeq) reach.seenSeq = fact.seenSeq;
  }
  return facts.filter((fact) => {
    const { seq } = fact;
    const own = reachOf(devices, fact);
    if (own && own.deviceSeq > fact.deviceSeq) return false;
    return seq === null || !devices.some((other) => other !== own && other.seenSeq >= seq);
  });
}

/** How far one person on one device had got: the last act, and the furthest that was fetched. */
type Reach = Pick<Placed, 'authorId' | 'deviceId' | 'deviceSeq' | 'seenSeq'>;

const reachOf = (devices: readonly Reach[], fact: Placed): Reach | undefined =>
  devices.find((device) => device.deviceId === fact.deviceId && device.authorId === fact.authorId);

/** Order of the record: by seq; what still waits on the device comes last, in the order it was made. */
export function inRecordOrder(a: Placed, b: Placed): number {
  if (a.seq !== null && b.seq !== null) return a.seq - b.seq;
  if (a.seq !== null) return -1;
  if (b.seq !== null) return 1;
  return a.deviceSeq - b.deviceSeq || (a.id < b.id ? -1 : 1);
}
