import { randomUUID } from 'node:crypto';
import { expect, test } from '@playwright/test';
import pg from 'pg';
import { noViolations, overflow } from './field-checks';
import { keepScreenshot } from './keep-screenshot';
import { planPour } from './office-pour';
import { appAddress, demo, phone, signedIn } from './sign-in';

test('a project in which nothing has happened says what will stand there, and how it begins', async ({
  browser,
}) => {
  const database = new pg.Client({ connectionString: process.env.E2E_DATABASE });
  await database.connect();
  const projectId = randomUUID();
  const { page, context } = await signedIn(browser, 'secondInspector', phone, '/account');
  const look = async (name: string) => {
    await noViolations(page, name);
    expect(await overflow(page), name).toBe(0);
    await keepScreenshot(page, `office/empty-${name}`);
  };
  try {
    await database.query(
      "insert into projects (id, name, place, time_zone) values ($1, 'Mooring dolphins, Lower Reach', '', 'America/Halifax')",
      [projectId],
    );
    await database.query('insert into project_counters (project_id) values ($1)', [projectId]);
    await database.query(
      `insert into memberships (project_id, person_id, role) select $1, id, 'inspector' from users where email = $2`,
      [projectId, demo.secondInspector],
    );
    await page.goto(appAddress('/pours'));
    await page.getByLabel('Project').selectOption(projectId);
    await expect(page.getByText('No pour is planned in the next two weeks.')).toBeVisible();
    await expect(page.getByText('No pours yet')).toBeVisible();
    await expect(page.getByRole('button', { name: /CSV/ })).toHaveCount(0);
    await look('pours');

    const head = page.getByRole('navigation', { name: 'Main' });
    await head.getByRole('link', { name: 'Nonconformances' }).click();
    await expect(page.getByText('None has been raised')).toBeVisible();
    await look('nonconformances');
    await head.getByRole('link', { name: 'Project', exact: true }).click();
    for (const words of [
      'No instrument is registered.',
      'No drawing has been received.',
      'No plan names a mix, and no change of one was recorded.',
    ])
      await expect(page.getByText(words)).toBeVisible();
    await look('project');

    await head.getByRole('link', { name: 'Pours' }).click();
    await page.getByRole('main').getByRole('link', { name: 'Plan a pour' }).first().click();
    await expect(page.getByRole('heading', { level: 1, name: 'Plan a pour' })).toBeVisible();
    await expect(page.getByText('Copy from an earlier pour')).toHaveCount(0);

    const pourId = await planPour(page, 'M-001', 'Dolphin cap', projectId);
    await page.goto(appAddress(`/pours/${pourId}`));
    const main = page.getByRole('main');
    for (const words of [
      '5 of 5 points not read',
      'None has been raised.',
      'No decision carries a condition.',
      'The plan asks for no measurements.',
      'No photos.',
      'Nobody has signed yet.',
    ])
      await expect(main.getByText(words).first()).toBeVisible();
    await look('pour');
  } finally {
    // Later tests choose a person's project by name: the membership goes, the record stays.
    await database.query('update memberships set removed_at = now() where project_id = $1', [projectId]);
    await database.end();
    await context.close();
  }
});
