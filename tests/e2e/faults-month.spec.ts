import { expect, test } from '@playwright/test';
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { environmentFor } from '../../scripts/setup/secrets.mjs';
import { startTestCluster, testSecrets } from '../../scripts/setup/test-cluster.mjs';
import { openBuildingSite, type BuildingSite } from '../faults/browser/building-site';
import { keepReading, notSent, openFace, openField, signIn, takeGauge } from '../faults/browser/field-page';
import { workAMonth } from '../faults/browser/month-of-work';
import { SeenHistory } from '../faults/browser/on-the-line';
import { httpLine } from '../faults/world/http-line';
import { everything } from '../faults/world/seeded';

// Its negative control, what the checker says of a record that lost or doubled one of thousands, is in
// tests/faults/check-history.test.ts.
const READINGS = everything ? 10_000 : 600;
const PHOTOS = everything ? 500 : 2;
const MINUTE = 60_000;

let site: BuildingSite;
test.beforeEach(async () => {
  site = await openBuildingSite(process.env.E2E_APP ?? '', process.env.E2E_DATABASE ?? '');
});
test.afterEach(() => site.close());

test(`thirty days offline: ${READINGS} readings and ${PHOTOS} photos open, more is saved, and all drains after signing in again`, async ({
  context,
}) => {
  test.setTimeout(everything ? 60 * MINUTE : 4 * MINUTE);
  const { first } = site.people;
  const page = await context.newPage();
  await signIn(page, site, first);
  await openField(page, site);
  await takeGauge(page);
  await context.setOffline(true);
  await keepReading(page, 46);
  await page.goto(`${site.app}/field/not-sent`);
  const month = await workAMonth(page, site, first, { readings: READINGS, photos: PHOTOS });

  await page.goto(`${site.app}/field`);
  const waits = 1 + READINGS + 2 * PHOTOS;
  await expect(notSent(page)).toContainText(`${waits} not sent yet`, { timeout: MINUTE });
  await openFace(page, site);
  await expect(page.getByRole('banner')).toContainText('8 of 8 read', { timeout: MINUTE });
  await keepReading(page, 51);
  const history = new SeenHistory(site);
  await history.note(page, first);
  expect(history.recorded.size).toBe(READINGS + PHOTOS + 2);
  expect(month.every((id) => history.recorded.has(id))).toBe(true);

  // No session lasts that long.
  await site.sql('update sessions set revoked_at = now() where person_id = $1', [first.id]);
  await context.setOffline(false);
  await expect(notSent(page)).toContainText('sign in to send', { timeout: MINUTE });
  await signIn(page, site, first);
  await expect(notSent(page)).toContainText('all sent', { timeout: everything ? 45 * MINUTE : 2 * MINUTE });
  expect(await history.violations([{ page, person: first }])).toEqual([]);
  expect(await wrongPhotos()).toEqual([]);
  const verified = await verifyRecord();
  expect(verified.status, verified.stderr).toBe(0);
  expect(verified.stdout).toContain('the record is as it was written');
});

/** What is wrong with the photos: each has to be stored, with the bytes of which the entry names the digest. */
async function wrongPhotos(): Promise<string[]> {
  const { rows } = await site.sql(
    `select photos.id, photos.state, entries.body ->> 'sha256' as sha256 from entries
       left join photos on photos.project_id = entries.project_id and photos.entry_id = entries.id
       where entries.project_id = $1 and entries.type = 'photo'`,
    [site.projectId],
  );
  const wrong = rows.length === PHOTOS ? [] : [`${rows.length} photos in place of ${PHOTOS}`];
  const ask = httpLine(site.app, site.cookieOf(site.people.engineer));
  for (const { id, state, sha256 } of rows) {
    const answer = await ask(`/api/photos/${String(id)}/address`, { method: 'GET' });
    const { url = '' } = (await answer.json()) as { url?: string };
    const bytes = url && Buffer.from(await (await fetch(url)).arrayBuffer());
    const found = createHash('sha256').update(bytes).digest('hex');
    if (state !== 'stored' || found !== sha256) wrong.push(`${String(id)}: ${String(state)}, ${found}`);
  }
  return wrong;
}

/** `npm run record:verify` over the whole of this run's database. */
async function verifyRecord() {
  const cluster = await startTestCluster();
  const ports = { app: 1, objects: 1, smtp: 1, mail: 1 };
  const env = environmentFor({ secrets: testSecrets, cluster, database: 'cagewright_e2e', ports });
  return spawnSync(process.execPath, ['--import', 'tsx', 'scripts/record-verify.ts'], {
    env,
    encoding: 'utf8',
  });
}
