import { openDB, type DBSchema, type IDBPDatabase, type OpenDBCallbacks } from 'idb';

const openings = new WeakMap<object, () => Promise<void>>();

/**
 * Opens a database that this tab goes on using after a newer program, in another tab, has changed its shape: it lets
 * go for that moment, and takes the database up again as it is then. Later versions may only add to it.
 * @param version the shape that this program knows
 */
export async function openLastingDatabase<S extends DBSchema>(
  name: string,
  version: number,
  upgrade: NonNullable<OpenDBCallbacks<S>['upgrade']>,
): Promise<IDBPDatabase<S>> {
  let closed = false;
  let opening: Promise<void> = Promise.resolve();
  const open = (shape: number | undefined): Promise<IDBPDatabase<S>> =>
    openDB<S>(name, shape, {
      upgrade: (...given) => {
        // Asked for as it is: where it is gone, an empty one must not take its place.
        if (shape === undefined) throw new Error('The store is gone.');
        void upgrade(...given);
      },
      blocking(_current, blocked, event) {
        (event.target as IDBDatabase).close();
        if (closed || blocked === null) return;
        opening = open(undefined).then((again) => {
          if (closed) again.close();
          else current = again;
        });
        opening.catch(() => undefined);
      },
    });
  let current = await open(version);
  const lasting = new Proxy(current, {
    get(_target, key) {
      if (key === 'close') {
        return () => {
          closed = true;
          current.close();
        };
      }
      const value: unknown = Reflect.get(current, key);
      return typeof value === 'function' ? (value.bind(current) as unknown) : value;
    },
  });
  openings.set(lasting, () => opening);
  return lasting;
}

/** Runs the work on the store, and once more where the store was being changed under it just then. */
export async function onceMoreIfReopened<T>(db: object, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const opening = openings.get(db);
    if (!opening || !isClosed(error)) throw error;
    await opening();
    return work();
  }
}

/** The connection was closing: nothing of the work was begun. */
const isClosed = (error: unknown): boolean =>
  error !== null && typeof error === 'object' && 'name' in error && error.name === 'InvalidStateError';
