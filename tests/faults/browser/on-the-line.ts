import type { Page } from '@playwright/test';
import { violations, type History } from '../world/check-history';
import { fetchedAfresh } from '../world/hand';
import { httpLine } from '../world/http-line';
import { contentOf } from '../world/model-server';
import { Clock } from '../world/phone';
import type { BuildingSite, SitePerson } from './building-site';
import { recordedHere, stored, waiting } from './field-page';

/** What people did in a run with real browsers, gathered as they see it: an entry counts once the screen says "kept". */
export class SeenHistory {
  readonly recorded: History['recorded'] = new Map();

  constructor(private readonly site: BuildingSite) {}

  /** Takes down what was recorded since: read from the device's own store, right after the screen has said so. */
  async note(page: Page, person: SitePerson): Promise<void> {
    for (const entry of await recordedHere(page, person.id)) {
      if (!this.recorded.has(entry.id))
        this.recorded.set(entry.id, { content: contentOf(entry), phone: person.name, poison: false });
    }
  }

  /** What is broken at the end, when all is sent; the pages are one for each person's device. */
  async violations(pages: readonly { page: Page; person: SitePerson }[]): Promise<string[]> {
    const { site } = this;
    const phones = [];
    for (const { page, person } of pages) {
      const refused = await stored<{ id: string; sentence: string }>(page, person.id, 'refused');
      phones.push({
        name: person.name,
        waiting: (await waiting(page, person.id)).map(({ id }) => id),
        refused: refused.map(({ id, sentence }) => ({ id, sentence })),
      });
    }
    return violations({
      history: { recorded: this.recorded },
      server: await site.record(),
      phones,
      secondDevice: await fetchedAfresh(
        httpLine(site.app, site.cookieOf(site.people.engineer)),
        new Clock(new Date().toISOString()),
        site.pourId,
      ),
      writtenByServer: ['plan-issued', 'photo-stored', 'photo-refused'],
    });
  }
}
