/** What of a store of records, one key each, is used to read many. */
interface Readable<T> {
  count(range: IDBKeyRange): Promise<number>;
  getAll(range: IDBKeyRange): Promise<T[]>;
  get(id: string): Promise<T | undefined>;
}

interface Deletable {
  getAllKeys(range: IDBKeyRange, most: number): Promise<string[]>;
  delete(key: string | IDBKeyRange): Promise<void>;
}

/** Up to so many records that nobody asked for are read along with the others, since one request costs more. */
const STRANGERS = 500;

/** Ids begin with the time at which they were made, so what was recorded in a row lies in a row. */
function rangeOf(ids: readonly string[]): IDBKeyRange | null {
  const [first = null, last = null] = [least(ids), most(ids)];
  return first === null || last === null ? null : IDBKeyRange.bound(first, last);
}

const least = (ids: readonly string[]) =>
  ids.reduce<string | null>((found, id) => (found === null || id < found ? id : found), null);
const most = (ids: readonly string[]) =>
  ids.reduce<string | null>((found, id) => (found === null || id > found ? id : found), null);

/** The records of these ids that are there, in a few requests where the ids lie close together. */
export async function getMany<T extends { id: string }>(
  store: Readable<T>,
  ids: readonly string[],
): Promise<Map<string, T>> {
  const range = rangeOf(ids);
  if (!range) return new Map();
  const wanted = new Set(ids);
  const found =
    (await store.count(range)) <= ids.length + STRANGERS
      ? await store.getAll(range)
      : await Promise.all(ids.map((id) => store.get(id)));
  return new Map(found.flatMap((one) => (one && wanted.has(one.id) ? [[one.id, one]] : [])));
}

/** Deletes these ids and nothing else: at once where nothing else lies between them. */
export async function deleteMany(store: Deletable, ids: readonly string[]): Promise<void> {
  const range = rangeOf(ids);
  if (!range) return;
  const going = new Set(ids);
  const between = await store.getAllKeys(range, ids.length + 1);
  if (between.every((id) => going.has(id))) await store.delete(range);
  else await Promise.all(ids.map((id) => store.delete(id)));
}
