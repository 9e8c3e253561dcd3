/** How many versions, this one included, keep their files: a tab left open for days still finds its own. */
const VERSIONS_KEPT = 3;
const NOTES = 'cagewright-shell-versions';
const NOTE = '/versions';

/**
 * Deletes what none of the last versions asks for. Workbox would delete at once whatever the new version lacks, and
 * with it the chunks of tabs that still run the old one.
 * @param current absolute addresses of this version's files, as they are kept in the cache
 */
export async function cleanUpLate(cacheName: string, current: readonly string[]): Promise<void> {
  const notes = await caches.open(NOTES);
  const known = await notes.match(NOTE).then(
    async (note) => (note ? ((await note.json()) as string[][]) : []),
    () => [],
  );
  const files = current.map((file) => new URL(file, self.location.href).href).sort();
  const same = (other: readonly string[] | undefined) => JSON.stringify(other) === JSON.stringify(files);
  const versions = same(known[0]) ? known : [files, ...known].slice(0, VERSIONS_KEPT);
  await notes.put(NOTE, new Response(JSON.stringify(versions)));
  const wanted = new Set(versions.flat());
  const cache = await caches.open(cacheName);
  for (const request of await cache.keys()) {
    if (!wanted.has(request.url)) await cache.delete(request);
  }
}
