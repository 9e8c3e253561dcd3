import { openDB, unwrap } from 'idb';
import { get, set, type UseStore } from 'idb-keyval';

/** Somebody who has signed in on this device, with how much of their work waits here. */
export interface PersonHere {
  id: string;
  name: string;
  email: string;
  waiting: number;
}

interface Settings {
  deviceId: string;
  /** Whose work is open; null after signing out. */
  personId: string | null;
  people: PersonHere[];
}

/** The small store that all people of this device share: no record of anybody's work, no secret. */
export interface SettingsStore {
  read<K extends keyof Settings>(key: K): Promise<Settings[K] | undefined>;
  write<K extends keyof Settings>(key: K, value: Settings[K]): Promise<void>;
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
    close: () => db.close(),
  };
}
