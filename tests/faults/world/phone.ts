import 'fake-indexeddb/auto';
import { createHash, randomUUID } from 'node:crypto';
import { v7 } from 'uuid';
import { createDevice, type RunningDevice } from '@/lib/device/create-device';
import type { DeviceEnvironment, TabMessage } from '@/lib/device/device-environment';
import { photoTypeOf, preparePhoto } from '@/lib/device/photos/prepare-photo';

/** A line between a phone and the server: it may do anything to a request. */
export type Line = (address: string, init: RequestInit) => Promise<Response>;

/** The time of one test: it stands still until it is moved. */
export class Clock {
  #now: number;
  #timers: { at: number; run: () => void }[] = [];

  constructor(start = '2026-12-01T07:00:00.000Z') {
    this.#now = Date.parse(start);
  }

  now = (): number => this.#now;

  after = (milliseconds: number, run: () => void): (() => void) => {
    const timer = { at: this.#now + milliseconds, run };
    this.#timers.push(timer);
    return () => {
      this.#timers = this.#timers.filter((one) => one !== timer);
    };
  };

  /** Milliseconds until the next timer of at least that length from now; null when there is none. */
  next(): number | null {
    const times = this.#timers.map((timer) => timer.at - this.#now);
    return times.length === 0 ? null : Math.min(...times);
  }

  /** Moves the time and runs what has fallen due. */
  advance(milliseconds: number): void {
    this.#now += milliseconds;
    const due = this.#timers.filter((timer) => timer.at <= this.#now);
    this.#timers = this.#timers.filter((timer) => timer.at > this.#now);
    due.forEach((timer) => timer.run());
  }
}

/** What a phone keeps when its tabs are closed: its store (by name), its cookies, and what its tabs share. */
export class Phone {
  readonly name = randomUUID();
  /** Raised when the store is emptied: what was there is gone, cookies stay. */
  generation = 0;
  readonly cookies = new Map<string, string>();
  readonly #locks = new Set<string>();
  readonly #tabs = new Map<string, Set<(message: TabMessage) => void>>();
  readonly open: RunningDevice[] = [];
  readonly wakes = new Set<() => void>();
  /** Milliseconds by which this phone's clock is off. */
  clockSkewMs = 0;

  constructor(
    readonly clock: Clock,
    public line: Line,
    private readonly random: () => number = () => 0.5,
  ) {}

  environment(over: Partial<DeviceEnvironment> = {}): DeviceEnvironment {
    let noted: string | null = null;
    return {
      tabNote: { read: () => noted, write: (personId) => void (noted = personId) },
      crypto: globalThis.crypto,
      now: () => this.clock.now() + this.clockSkewMs,
      newId: () => v7(),
      random: this.random,
      fetch: (address, init) => this.line(address, init),
      databaseName: (name) => `${this.name}-${this.generation}-${name}`,
      ifFree: async (lock, run) => {
        if (this.#locks.has(lock)) return 'taken';
        this.#locks.add(lock);
        try {
          return await run();
        } finally {
          this.#locks.delete(lock);
        }
      },
      channel: (name, heard) => {
        const tabs = this.#tabs.get(name) ?? new Set();
        this.#tabs.set(name, tabs.add(heard));
        return {
          post: (message) => {
            for (const other of tabs)
              if (other !== heard) queueMicrotask(() => tabs.has(other) && other(message));
          },
          close: () => void tabs.delete(heard),
        };
      },
      marks: {
        names: () => [...this.cookies.keys()],
        read: (name) => this.cookies.get(name) ?? null,
        write: (name, value) => void this.cookies.set(name, value),
      },
      after: this.clock.after,
      onWake: (run) => {
        this.wakes.add(run);
        return () => this.wakes.delete(run);
      },
      inSight: () => true,
      storage: {
        estimate: async () => ({ usedBytes: 1000, quotaBytes: 1_000_000, persisted: false }),
        keep: async () => undefined,
      },
      askForBackgroundSync: () => undefined,
      preparePhoto: (file) =>
        preparePhoto(file, {
          sizeOf: async (blob) => {
            if (!photoTypeOf(new Uint8Array(await blob.arrayBuffer()))) throw new Error('not decodable');
            return { width: 4, height: 3 };
          },
          compress: async (blob) => blob,
          digest: async (bytes) => {
            const hash = createHash('sha256').update(new Uint8Array(bytes)).digest();
            return hash.buffer.slice(hash.byteOffset, hash.byteOffset + hash.byteLength) as ArrayBuffer;
          },
        }),
      photoUrl: (_bytes, type) => `blob:${type}`,
      updates: null,
      ...over,
    };
  }

  /** Opens a tab and waits until it knows who is signed in (or that it cannot be known now). */
  async tab(over: Partial<DeviceEnvironment> = {}): Promise<RunningDevice> {
    const device = createDevice(this.environment(over));
    this.open.push(device);
    await device.refreshPerson();
    return device;
  }

  /** Closes all tabs at once, in the middle of whatever they do. */
  async kill(): Promise<void> {
    await Promise.all(this.open.splice(0).map((device) => device.close()));
    // A lock of a tab that is gone is free.
    this.#locks.clear();
  }

  /** The browser clears the store under pressure; cookies stay. */
  async emptyStore(): Promise<void> {
    await this.kill();
    this.generation += 1;
  }
}

/** Lets everything that is under way and needs no timer come to its end. */
export async function settle(turns = 30): Promise<void> {
  for (let turn = 0; turn < turns; turn += 1) await new Promise((done) => setImmediate(done));
}

export const jpeg = (filler = 7): Blob =>
  new Blob([new Uint8Array([0xff, 0xd8, 0xff, 0xe0, ...Array.from({ length: 40 }, () => filler)])], {
    type: 'image/jpeg',
  });

/** Waits for something that real threads (compression, say) take part in. */
export async function until(holds: () => boolean, what: string): Promise<void> {
  const give = Date.now() + 20_000;
  while (!holds()) {
    if (Date.now() > give) throw new Error(`This did not come about: ${what}`);
    await new Promise((done) => setTimeout(done, 2));
  }
}
