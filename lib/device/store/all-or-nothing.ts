/**
 * Runs the work of one transaction and waits for it to complete. Whatever goes wrong undoes all of it: without the
 * abort, requests made before the mistake would still be committed.
 * @throws why the transaction ended (a full device, say), or what went wrong in the work
 */
export async function allOrNothing<T>(
  tx: { abort(): void; readonly done: Promise<void> },
  work: () => Promise<T>,
): Promise<T> {
  tx.done.catch(() => undefined);
  try {
    const result = await work();
    await tx.done;
    return result;
  } catch (error) {
    try {
      tx.abort();
    } catch {
      // It has ended by itself.
    }
    // Requests under way only say that they were aborted; the transaction knows why.
    const why = await tx.done.then(
      () => error,
      (reason: unknown) => reason,
    );
    throw isAbort(why) ? error : why;
  }
}

const isAbort = (reason: unknown): boolean =>
  reason !== null && typeof reason === 'object' && 'name' in reason && reason.name === 'AbortError';
