import { expect, test, type Page } from '@playwright/test';
import pg from 'pg';
import { appAddress, demo, DEMO_PASSWORD, laptop, phone, signedIn } from './sign-in';

const fillIn = async (page: Page, email: string, password: string) => {
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
};

test('signing in says what is wrong, keeps the address, and leads back to where one was going', async ({
  page,
}) => {
  await page.goto(appAddress('/nonconformances?show=asked'));
  await expect(page).toHaveURL(/\/sign-in\?next=/);
  await fillIn(page, 'marit', '');
  await expect(page.getByText('Write your e-mail address.')).toBeVisible();
  await expect(page.getByText('Write your password.')).toBeVisible();
  await fillIn(page, demo.superintendent, 'not the password');
  await expect(page.getByText(/do not go together/)).toBeVisible();
  await expect(page.getByLabel('E-mail')).toHaveValue(demo.superintendent);
  await expect(page.getByLabel('Password')).toHaveValue('');
  await page.context().setOffline(true);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByText(/There is no connection to the server/)).toBeVisible();
  await page.context().setOffline(false);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL(/\/nonconformances\?show=asked$/);
});

test('nobody is led to another site after signing in', async ({ page }) => {
  await page.goto(appAddress('/sign-in?next=https://elsewhere.example.test/'));
  await fillIn(page, demo.viewer, DEMO_PASSWORD);
  await expect(page).toHaveURL(appAddress('/pours'));
});

test('signing out everywhere ends the other session at once', async ({ browser }) => {
  const here = await signedIn(browser, 'coordinator', laptop, '/account');
  const there = await signedIn(browser, 'coordinator', phone, '/project');
  await here.page.reload();
  const sessions = here.page.getByRole('table', { name: 'Sessions' }).getByRole('row');
  expect(await sessions.count()).toBeGreaterThanOrEqual(3);
  await expect(sessions.filter({ hasText: '(this one)' })).toHaveCount(1);

  await here.page.getByRole('button', { name: 'Sign out everywhere' }).click();
  const dialog = here.page.getByRole('dialog');
  await expect(dialog).toContainText('Work that is not sent yet stays on its device');
  await here.page.keyboard.press('Escape');
  await expect(dialog).toBeHidden();
  await expect(here.page.getByRole('button', { name: 'Sign out everywhere' })).toBeFocused();
  await here.page.keyboard.press('Enter');
  await dialog.getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(here.page).toHaveURL(/\/sign-in/);

  await there.page.goto(appAddress('/project'));
  await expect(there.page).toHaveURL(/\/sign-in\?next=%2Fproject/);
  await here.context.close();
  await there.context.close();
});

test('a form that is sent after the session ended keeps what was typed', async ({ browser }) => {
  const { page, context } = await signedIn(browser, 'coordinator', laptop, '/pours');
  await page.getByRole('table').getByRole('link', { name: 'P-018' }).click();
  await page.getByRole('button', { name: 'Write a note' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Note').fill('Kept while away');
  const cookies = await context.cookies();
  await context.clearCookies();
  await dialog.getByRole('button', { name: 'Record the note' }).click();
  await expect(dialog.getByText('Sign in to go on. What you had entered is kept.')).toBeVisible();
  await expect(dialog.getByLabel('Note')).toHaveValue('Kept while away');
  await context.addCookies(cookies);
  await dialog.getByRole('button', { name: 'Record the note' }).click();
  await expect(dialog).toBeHidden();
  await expect(page.locator('#record')).toContainText('Kept while away');
  await context.close();
});

test('what is not there says so, with the office around it and its scripts at work', async ({ browser }) => {
  const { page, context } = await signedIn(browser, 'viewer', laptop, '/pours');
  const said: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error') said.push(message.text());
  });
  for (const path of ['/nothing/at/all', '/%E0%A4%A', '/pours/nothing']) {
    const answer = await page.goto(appAddress(path));
    expect(answer?.status(), path).toBe(404);
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(
      'There is nothing here that you can see',
    );
  }
  expect(said.filter((text) => !/status of 404/.test(text))).toEqual([]);
  await page.getByRole('link', { name: 'Nonconformances' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Nonconformances' })).toBeVisible();
  await context.close();
});

test('a page that cannot be drawn gives an incident to quote, and nothing of the inside', async ({
  browser,
}) => {
  const { page, context } = await signedIn(browser, 'viewer', laptop, '/pours');
  const database = new pg.Client({ connectionString: process.env.E2E_DATABASE });
  await database.connect();
  await database.query('alter table nonconformance_summaries rename to put_away');
  try {
    const answer = await page.goto(appAddress('/nonconformances'));
    expect(answer?.status()).toBe(500);
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('This page could not be drawn');
    await expect(page.getByText(/^Incident \d+$/)).toBeVisible();
    expect(await page.content()).not.toContain('nonconformance_summaries');
  } finally {
    await database.query('alter table put_away rename to nonconformance_summaries');
    await database.end();
  }
  await page.getByRole('button', { name: 'Try again' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Nonconformances' })).toBeVisible();
  await context.close();
});
