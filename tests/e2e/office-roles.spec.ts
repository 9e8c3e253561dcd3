import { randomUUID } from 'node:crypto';
import { expect, test, type Page } from '@playwright/test';
import pg from 'pg';
import { ask, planPour, projectOf, reading, record } from './office-pour';
import { appAddress, demo, laptop, phone, signedIn } from './sign-in';

type Who = keyof typeof demo;

/** The address of a pour of the demo, from the list that the person sees. */
async function pourAddress(page: Page, number: string): Promise<string> {
  await page.goto(appAddress('/pours'));
  const address = await page.getByRole('table').getByRole('link', { name: number }).getAttribute('href');
  return address!;
}

/** The names of the buttons under what a person can record, folded ones included. */
async function recordable(page: Page): Promise<string[]> {
  const more = page.getByText('Record something else');
  if (await more.isVisible()) await more.click();
  return page
    .getByRole('list', { name: /What (else )?you can record here/ })
    .getByRole('button')
    .allInnerTexts();
}

const offers: Record<
  'inspector' | 'superintendent' | 'engineer' | 'coordinator' | 'viewer',
  { records: string[]; release: boolean; revises: boolean; queries: boolean; plans: boolean }
> = {
  inspector: {
    records: [
      'Place a hold',
      'Write a note',
      'Record a site event',
      'Verbal instruction',
      'Placing has started',
    ],
    release: false,
    revises: true,
    queries: true,
    plans: true,
  },
  superintendent: {
    records: [
      'Report a correction',
      'Ask for an inspection',
      'Ask for the release',
      'Write a note',
      'Record a site event',
      'Verbal instruction',
      'Placing has started',
    ],
    release: true,
    revises: true,
    queries: true,
    plans: true,
  },
  engineer: {
    records: ['Place a hold', 'Write a note', 'Record a site event'],
    release: true,
    revises: true,
    queries: true,
    plans: true,
  },
  coordinator: {
    records: ['Place a hold', 'Write a note'],
    release: false,
    revises: false,
    queries: true,
    plans: false,
  },
  viewer: { records: [], release: false, revises: false, queries: false, plans: false },
};

test.describe('what each role is offered on a pour', () => {
  for (const [who, offer] of Object.entries(offers) as [keyof typeof offers, (typeof offers)['viewer']][]) {
    test(who, async ({ browser }) => {
      const { page, context } = await signedIn(browser, who, laptop, '/pours');
      await expect(page.getByRole('link', { name: 'Plan a pour' })).toHaveCount(offer.plans ? 1 : 0);
      const address = await pourAddress(page, 'P-014');
      await page.goto(appAddress(address));
      await expect(page.getByRole('heading', { level: 1, name: /P-014/ })).toBeVisible();
      expect(await recordable(page)).toEqual(offer.records);
      await expect(page.getByRole('link', { name: /the release$/ })).toHaveCount(offer.release ? 1 : 0);
      await expect(page.getByRole('link', { name: 'Revise the plan' })).toHaveCount(offer.revises ? 1 : 0);
      const questions = page.locator('#record').getByRole('button', { name: /^Query: / });
      if (offer.queries) expect(await questions.count()).toBeGreaterThan(0);
      else await expect(questions).toHaveCount(0);

      // What is not offered is not there by its address either.
      for (const [path, may] of [
        [`${address}/release`, offer.release],
        [`${address}/plan`, offer.revises],
        ['/pours/new', offer.plans],
      ] as const) {
        const answer = await page.goto(appAddress(path));
        expect(answer?.status(), path).toBe(may ? 200 : 404);
      }
      await context.close();
    });
  }
});

test('a viewer writes nothing: no form, and every write refused', async ({ browser }) => {
  const { page, context } = await signedIn(browser, 'viewer', laptop, '/pours');
  const address = await pourAddress(page, 'P-014');
  const pourId = address.split('/').at(-1)!;
  for (const path of [address, `${address}/record`, '/nonconformances', '/project', '/pours']) {
    await page.goto(appAddress(path));
    const main = page.getByRole('main');
    await expect(main).toBeVisible();
    const names = await main
      .getByRole('button')
      .evaluateAll((buttons) =>
        buttons.map((one) => one.getAttribute('aria-label') ?? one.textContent ?? ''),
      );
    const reads = /^(Show|CSV of these rows|Print|Certificate of release \d+|Look at closely: .*|)$/;
    expect(
      names.filter((name) => !reads.test(name.trim())),
      path,
    ).toEqual([]);
  }
  await page.goto(appAddress(address));
  const head = await ask(page, 'GET', `/api/pours/${pourId}/live`);
  const writes: [string, unknown][] = [
    ['entries', { type: 'note', body: { about: { kind: 'pour', id: pourId }, text: 'x' } }],
    ['release', { scope: { elementIds: null, limits: '' }, reason: '' }],
    ['dispositions', { body: {}, password: 'x' }],
    ['plan', { reason: 'x', plan: {} }],
  ];
  for (const [path, body] of writes) {
    const answer = await ask(page, 'POST', `/api/pours/${pourId}/${path}`, body);
    expect([400, 403, 404], `${path}: ${JSON.stringify(answer.body)}`).toContain(answer.status);
    expect(answer.status, path).not.toBe(201);
  }
  const note = await ask(page, 'POST', `/api/pours/${pourId}/entries`, writes[0]![1]);
  expect(note.body.code).toBe('not-allowed');
  const after = await ask(page, 'GET', `/api/pours/${pourId}/live`);
  expect(after.body.headSeq).toBe(head.body.headSeq);
  await context.close();
});

test('crew see only the fix list of their pours', async ({ browser }) => {
  const viewer = await signedIn(browser, 'viewer', laptop, '/pours');
  const address = await pourAddress(viewer.page, 'P-014');
  await viewer.page.goto(appAddress('/nonconformances'));
  const sheet = await viewer.page
    .getByRole('table')
    .getByRole('link', { name: /Low cover at B3/ })
    .getAttribute('href');
  await viewer.context.close();

  const { page, context } = await signedIn(browser, 'crew', phone, '/account');
  await expect(page.getByRole('navigation', { name: 'Main' }).getByRole('link')).toHaveText(['Field']);
  for (const path of [
    '/pours',
    address,
    `${address}/record`,
    `${address}/release`,
    '/nonconformances',
    sheet!,
    '/project',
  ]) {
    const answer = await page.goto(appAddress(path));
    expect(answer?.status(), path).toBe(404);
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(
      'There is nothing here that you can see',
    );
  }
  await page.goto(appAddress('/'));
  await expect(page).toHaveURL(/\/field/);
  await context.close();
});

test("another project's pour is not there, and is told from a made-up one by nothing", async ({
  browser,
}) => {
  const database = new pg.Client({ connectionString: process.env.E2E_DATABASE });
  await database.connect();
  const projectId = randomUUID();
  const { page, context } = await signedIn(browser, 'secondInspector', laptop, '/account');
  try {
    await database.query(
      "insert into projects (id, name, place, time_zone) values ($1, 'Lock gate, Upper Reach', 'Upstream', 'America/Halifax')",
      [projectId],
    );
    await database.query('insert into project_counters (project_id) values ($1)', [projectId]);
    await database.query(
      `insert into memberships (project_id, person_id, role) select $1, id, 'inspector' from users where email = $2`,
      [projectId, demo.secondInspector],
    );
    const demoProject = await projectOf(page);
    const ids = ((await ask(page, 'GET', '/api/sync/index')).body.projects as { id: string }[]).map(
      ({ id }) => id,
    );
    expect(ids).toContain(projectId);
    const pourId = await planPour(page, 'L-001', 'Sill', projectId);
    expect(demoProject).not.toBe(undefined);

    // It is there for its own people, and the head of the page follows it.
    await page.goto(appAddress(`/pours/${pourId}`));
    await expect(page.getByRole('heading', { level: 1, name: 'L-001 Sill' })).toBeVisible();
    await expect(page.getByLabel('Project')).toHaveValue(projectId);

    for (const who of ['superintendent', 'engineer', 'viewer'] satisfies Who[]) {
      const other = await signedIn(browser, who, laptop, '/account');
      const made = randomUUID();
      for (const part of ['', '/record', '/release', '/plan']) {
        const real = await other.page.goto(appAddress(`/pours/${pourId}${part}`));
        const words = await other.page.getByRole('main').innerText();
        const madeUp = await other.page.goto(appAddress(`/pours/${made}${part}`));
        expect([real?.status(), madeUp?.status()], `${who} ${part}`).toEqual([404, 404]);
        expect(await other.page.getByRole('main').innerText()).toBe(words);
      }
      const asked = await ask(other.page, 'GET', `/api/pours/${pourId}/live`);
      expect(asked).toEqual({ ...(await ask(other.page, 'GET', `/api/pours/${made}/live`)) });
      await other.context.close();
    }
  } finally {
    // Later tests choose a person's project by name: the membership goes, the record stays.
    await database.query('update memberships set removed_at = now() where project_id = $1', [projectId]);
    await database.end();
    await context.close();
  }
});

test.describe.serial('questions, holds and words, from the office', () => {
  let pourId = '';
  const open = async (browser: Parameters<typeof signedIn>[0], who: Who, path = '') => {
    const opened = await signedIn(browser, who, laptop, `/pours/${pourId}${path}`);
    await expect(opened.page.getByRole('heading', { level: 1 })).toBeVisible();
    return opened;
  };
  const say = async (page: Page, button: RegExp | string) => {
    const more = page.getByText('Record something else');
    const wanted = page.getByRole('main').getByRole('button', { name: button }).first();
    if (!(await wanted.isVisible()) && (await more.isVisible())) await more.click();
    await wanted.click();
    return page.getByRole('dialog');
  };

  test('a query holds until another person answers it', async ({ browser }) => {
    const boss = await signedIn(browser, 'superintendent', laptop, '/pours');
    pourId = await planPour(boss.page, 'P-901', 'Waiting room slab');
    await boss.context.close();
    const site = await open(browser, 'inspector');
    await record(site.page, pourId, 'answer', { checkId: 'bars', answer: 'met' });
    await site.context.close();

    const engineer = await open(browser, 'engineer');
    const form = await say(engineer.page, 'Query: Check met');
    await form.getByRole('button', { name: 'Send the query' }).click();
    await expect(form.getByText('Write something here.')).toBeVisible();
    await form.getByLabel('What is not clear').fill('Was the lap at grid G looked at?');
    await form.getByRole('button', { name: 'Send the query' }).click();
    await expect(form).toBeHidden();
    await expect(
      engineer.page.locator('#holds').getByText('Query: Was the lap at grid G looked at?'),
    ).toBeVisible();
    await engineer.context.close();

    const inspector = await open(browser, 'inspector');
    const answer = await say(inspector.page, /^Answer: Query: Was the lap/);
    await answer.getByLabel('Answer').fill('Yes, 820 mm, photo taken.');
    await answer.getByRole('button', { name: 'Record the answer' }).click();
    await expect(inspector.page.locator('#holds').getByText('Query: Was the lap')).toBeHidden();
    await expect(inspector.page.locator('#queries')).toContainText('Yes, 820 mm, photo taken.');
    await inspector.context.close();
  });

  test('a hold is lifted by the role it names, and by no other', async ({ browser }) => {
    const coordinator = await open(browser, 'coordinator');
    const form = await say(coordinator.page, 'Place a hold');
    await form.getByLabel('What', { exact: true }).fill('Harbour master inspects first');
    await form.getByLabel('What is needed').fill('The visit is noted');
    await form.getByRole('button', { name: 'Place the hold' }).click();
    await expect(form.getByText('Choose one.')).toBeVisible();
    await expect(form.getByLabel('Who clears it').getByRole('option', { name: 'Crew' })).toHaveCount(0);
    await form.getByLabel('Who clears it').selectOption({ label: 'Superintendent' });
    await form.getByRole('button', { name: 'Place the hold' }).click();
    await expect(form).toBeHidden();
    const lift = (page: Page) => page.getByRole('button', { name: 'Lift: Harbour master inspects first' });
    await expect(coordinator.page.getByText('Harbour master inspects first').first()).toBeVisible();
    await expect(lift(coordinator.page)).toHaveCount(0);
    await coordinator.context.close();

    const boss = await open(browser, 'superintendent');
    await lift(boss.page).click();
    const why = boss.page.getByRole('dialog');
    await why.getByLabel('Why it may be lifted').fill('Visited at 14:00');
    await why.getByRole('button', { name: 'Lift the hold' }).click();
    await expect(lift(boss.page)).toBeHidden();
    await boss.context.close();
  });

  test('a verbal instruction holds until the engineer has it in writing', async ({ browser }) => {
    const inspector = await open(browser, 'inspector');
    const form = await say(inspector.page, 'Verbal instruction');
    await form.getByLabel('Who gave it').fill('Site agent');
    await form.getByLabel('What was said').fill('Leave the chamfer out');
    await form.getByRole('button', { name: 'Record it' }).click();
    await expect(form).toBeHidden();
    const lift = (page: Page) => page.getByRole('button', { name: /^Lift: Verbal instruction not signed/ });
    await expect(inspector.page.locator('#holds')).toContainText('Leave the chamfer out');
    await expect(lift(inspector.page)).toHaveCount(0);
    await inspector.context.close();

    const engineer = await open(browser, 'engineer');
    await lift(engineer.page).click();
    const why = engineer.page.getByRole('dialog');
    await why.getByLabel('Why it may be lifted').fill('Signed sketch SK-4 of today');
    await why.getByRole('button', { name: 'Lift the hold' }).click();
    await expect(lift(engineer.page)).toBeHidden();
    await engineer.context.close();
  });

  test('a note is corrected by its author; the first words stay, struck through', async ({ browser }) => {
    const coordinator = await open(browser, 'coordinator');
    const form = await say(coordinator.page, 'Write a note');
    await form.getByLabel('Note').fill('Pump hose on the east side');
    await form.getByRole('button', { name: 'Record the note' }).click();
    await expect(form).toBeHidden();
    const amend = await say(coordinator.page, 'Amend: Note');
    await amend.getByLabel('How it should read').fill('Pump hose on the west side');
    await amend.getByRole('button', { name: 'Record it' }).click();
    await expect(amend.getByText('Write something here.')).toBeVisible();
    await amend.getByLabel('Why').fill('Wrong side written');
    await amend.getByRole('button', { name: 'Record it' }).click();
    await expect(amend).toBeHidden();
    const line = coordinator.page.locator('#record li').filter({ hasText: 'Wrong side written' }).last();
    await expect(line.locator('del')).toContainText('Pump hose on the east side');
    await expect(line).toContainText('Pump hose on the west side');
    await coordinator.context.close();

    const engineer = await open(browser, 'engineer', '/record?part=questions');
    await expect(engineer.page.getByRole('button', { name: 'Query: Note' })).toHaveCount(1);
    await expect(engineer.page.getByRole('button', { name: 'Amend: Note' })).toHaveCount(0);
    await engineer.context.close();
  });

  test('two people who revise one plan do not overwrite each other', async ({ browser }) => {
    const first = await open(browser, 'engineer', '/plan');
    const second = await open(browser, 'superintendent', '/plan');
    for (const { page } of [first, second])
      await page.getByLabel('Reason for the revision').fill('Other mix ordered');
    await first.page.getByRole('button', { name: 'Issue plan rev B' }).click();
    await expect(first.page.getByText('rev B').first()).toBeVisible();
    await second.page.getByRole('button', { name: 'Issue plan rev B' }).click();
    await expect(second.page.getByText(/Plan rev B was issued meanwhile/)).toBeVisible();
    await expect(second.page.getByLabel('Reason for the revision')).toHaveValue('Other mix ordered');
    await first.context.close();
    await second.context.close();
  });

  test('a correction is offered for what is not met, and says what was put right', async ({ browser }) => {
    const inspector = await open(browser, 'inspector');
    const point = await inspector.page
      .locator('tr[id^="point-"]')
      .first()
      .evaluate((row) => row.id.slice('point-'.length));
    await record(inspector.page, pourId, 'reading', reading(point, 31));
    await inspector.context.close();

    const boss = await open(browser, 'superintendent');
    const form = await say(boss.page, 'Report a correction');
    await form.getByLabel('What was done').fill('Chair set up again');
    await form.getByRole('button', { name: 'Report the correction' }).click();
    await expect(form.getByText('Tick at least one.')).toBeVisible();
    await form.getByRole('checkbox').first().check();
    await form.getByRole('button', { name: 'Report the correction' }).click();
    await expect(form).toBeHidden();
    await expect(boss.page.locator('#record')).toContainText('Chair set up again');
    await boss.context.close();
  });
});
