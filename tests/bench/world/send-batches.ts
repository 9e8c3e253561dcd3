import type { Page } from '@playwright/test';

/** Sends these bodies one after the other from a page of the bare server. @returns milliseconds */
export function sendFromPage(page: Page, bodies: readonly string[]): Promise<number> {
  return page.evaluate(async (all) => {
    const started = performance.now();
    for (const body of all) {
      const answer = await fetch('/', { method: 'POST', body });
      if (!answer.ok) throw new Error(await answer.text());
      await answer.json();
    }
    return performance.now() - started;
  }, bodies);
}

/** Sends these bodies one after the other from here, and reads every answer. @returns milliseconds, and the answers */
export async function sendFromNode<T>(
  send: (body: string) => Promise<Response>,
  bodies: readonly string[],
): Promise<{ ms: number; answers: T[] }> {
  const answers: T[] = [];
  const started = performance.now();
  for (const body of bodies) {
    const answer = await send(body);
    const text = await answer.text();
    if (!answer.ok) throw new Error(`Answered ${answer.status}: ${text.slice(0, 300)}`);
    answers.push(JSON.parse(text) as T);
  }
  return { ms: performance.now() - started, answers };
}
