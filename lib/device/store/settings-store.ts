import { openDB, unwrap } from 'idb';
import { get, set, update, type UseStore } from 'idb-keyval';
import type { PinRecord } from '../people/pin-guard';

/** What of a person's work waits on this device: how much and how old, never what. */
export interface WaitingHere {
  entries: number;
  photos: number;
  /** When the oldest of it was recorded; null where nothing waits. */
  oldestAt: string | null;
  /** Entries by pour, so that who goes on with a pour is told of them. */
  pours: Record<string, number>;
}

/** Somebody who has signed in on this device, with how much of their work waits here. */
export interface PersonHere {
  id: string;
  name: string;
  email: string;
  /** Devices of an earlier version kept a number here. */
  waiting: WaitingHere | number;
}

export interface Settings {
  deviceId: string;
  /** Whose work was opened last. Devices of an earlier version kept null after signing out. */
  personId: string | null;
  /** The device was handed over or signed out of: nobody's work opens by itself. */
  locked: boolean;
  /** Latest first. */
  people: PersonHere[];
  pins: Record<string, PinRecord>;
  /** The server's session as last heard of: another one means that somebody has signed in with their password. */
  session: { personId: string; since: string };
}

/** The small store that all people of this device share: no record of anybody's work, no secret. */
export interface SettingsStore {
  read<K extends keyof Settings>(key: K): Promise<Settings[K] | undefined>;
  write<K extends keyof Settings>(key: K, value: Settings[K]): Promise<void>;
  /** Reads and writes in one transaction, so that two tabs do not undo each other's change. */
  change<K extends keyof Settings>(
    key: K,
    next: (before: Settings[K] | undefined) => Settings[K],
  ): Promise<Settings[K]>;
  close(): void;
}

/**
 * idb-keyval by itself opens relaxed transactions; a device id that is handed out and then forgotten would be
 * made twice, so it gets a store function with strict ones.
 */
export async function openSettingsStore(name: string): Promise<SettingsStore> {
  const db = await openDB(name, 1, {
    upgrade: (fresh) => void fresh.createObjectStore('settings'),
    blocking: (_current, _blocked, event) => (event.target as IDBDatabase).close(),
  });
  const raw = unwrap(db);
  const strict: UseStore = async (mode, callback) =>
    callback(raw.transaction('settings', mode, { durability: 'strict' }).objectStore('settings'));
  return {
    read: (key) => get(key, strict),
    write: (key, value) => set(key, value, strict),
    change: async <K extends keyof Settings>(
      key: K,
      next: (before: Settings[K] | undefined) => Settings[K],
    ) => {
      let after: Settings[K] | undefined;
      await update<Settings[K]>(key, (before) => (after = next(before)), strict);
      return after as Settings[K];
    },
    close: () => db.close(),
  };
}
