import type { PreparedPhoto } from './photos/prepare-photo';

/** A message between tabs of one person: what has changed in the store. */
export interface TabMessage {
  /** Streams whose entries or plan changed; empty when only the book-keeping did. */
  streams: string[];
  /** A tab recorded something and asks whichever tab sends to go on. */
  send?: boolean;
}

export interface TabChannel {
  post(message: TabMessage): void;
  close(): void;
}

/** Everything that the phone's side takes from the browser, so that a test can give it another one. */
export interface DeviceEnvironment {
  /** Milliseconds since 1970 by the device's own clock. */
  now(): number;
  /** A new UUID, version 7. */
  newId(): string;
  /** 0 (inclusive) to 1 (exclusive), for jitter. */
  random(): number;
  fetch(address: string, init: RequestInit): Promise<Response>;
  /** The database of that name; tests hold several devices in one process. */
  databaseName(name: string): string;
  /** Calls `run` while holding the lock; `taken` without calling it when another tab holds it. */
  ifFree<T>(lock: string, run: () => Promise<T>): Promise<T | 'taken'>;
  channel(name: string, heard: (message: TabMessage) => void): TabChannel;
  /** What is kept outside of the store (cookies). */
  marks: {
    names(): string[];
    read(name: string): string | null;
    write(name: string, value: string): void;
  };
  /** What this tab keeps to itself, through a reload but not through being closed: whose work it had open. */
  tabNote: { read(): string | null; write(personId: string): void };
  /** For the hash of a PIN. A browser has no `subtle` under an address that is not secure. */
  crypto: Pick<Crypto, 'getRandomValues' | 'subtle'>;
  /** Calls back once after that many milliseconds; returns what stops it. */
  after(milliseconds: number, run: () => void): () => void;
  /** Calls back whenever it is worth trying at once: network back, tab in sight again, Background Sync. */
  onWake(run: () => void): () => void;
  /** Is somebody looking at this tab? Then it asks for others' entries from time to time. */
  inSight(): boolean;
  storage: {
    estimate(): Promise<{ usedBytes: number | null; quotaBytes: number | null; persisted: boolean | null }>;
    /** Asks the browser not to clear this origin's store under pressure. */
    keep(): Promise<void>;
  };
  /** Asks the browser to wake the worker when there is a network again, where it can. */
  askForBackgroundSync(): void;
  preparePhoto(file: Blob): Promise<PreparedPhoto>;
  photoUrl(bytes: ArrayBuffer, contentType: string): string;
  /** The service worker's updates, where there is a worker. */
  updates: { onReady(run: () => void): void; apply(): void } | null;
}
