import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { keepScreenshot } from './keep-screenshot';
import { appAddress, signIn } from './sign-in';

const POUR = 'P-016';
const tablet = { viewport: { width: 820, height: 1180 }, hasTouch: true } as const;
const notSent = (page: Page) => page.getByRole('banner').getByRole('link').last();
const handOver = (page: Page) => page.getByRole('button', { name: /Hand over$/ }).click();

async function press(page: Page, pin: string, last: string): Promise<void> {
  for (const digit of pin) await page.getByRole('button', { name: digit, exact: true }).click();
  await page.getByRole('button', { name: last, exact: true }).click();
}

async function choosePin(page: Page, pin: string): Promise<void> {
  await page.goto(appAddress('/field/pin'));
  await press(page, pin, 'Next');
  await expect(page.getByRole('heading', { name: 'The new PIN once more' })).toBeVisible();
  await press(page, pin, 'Keep');
  await expect(page.getByText('The PIN is kept on this device')).toBeVisible();
}

/** Opens the work of somebody from the list of the people of this tablet. */
async function hold(page: Page, name: RegExp, pin: string): Promise<void> {
  await page.locator('li button').filter({ hasText: name }).click();
  await press(page, pin, 'Open');
  await expect(page.getByRole('button', { name: /Hand over$/ })).toBeVisible();
}

async function keepNote(page: Page, pourPath: string, text: string): Promise<void> {
  await page.goto(appAddress(`${pourPath}/events`));
  await page.getByText('Note', { exact: true }).first().click();
  const form = page.locator('form').filter({ has: page.getByRole('button', { name: 'Keep the note' }) });
  await form.getByRole('textbox', { name: 'Note' }).fill(text);
  await form.getByRole('button', { name: 'Keep the note' }).click();
  await expect(form.getByText('Kept on this device.')).toBeVisible();
}

async function accessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  expect(violations.map(({ id, nodes }) => [id, nodes.map(({ html }) => html)])).toEqual([]);
}

test.describe.configure({ timeout: 240_000 });

test('one tablet goes from hand to hand in a basement, and each sends only what is theirs', async ({
  browser,
}) => {
  const context = await browser.newContext(tablet);
  const page = await context.newPage();
  let pourPath = '';

  await test.step('two inspectors have signed in on it, each with a PIN', async () => {
    await signIn(page, 'inspector', '/field');
    await page.getByRole('link', { name: new RegExp(POUR) }).click();
    await expect(page.getByRole('heading', { name: 'Left for you' })).toBeVisible();
    pourPath = new URL(page.url()).pathname;
    await choosePin(page, '2580');
    await accessible(page);
    await handOver(page);
    await expect(page.getByRole('heading', { name: 'Who is holding this device?' })).toBeVisible();
    await signIn(page, 'secondInspector', pourPath);
    await expect(page.getByText('Others use it too.')).toBeVisible();
    await expect(page.getByRole('heading', { name: 'Left for you' })).toBeVisible();
    await choosePin(page, '7391');
    await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
    await page.goto(appAddress(pourPath));
    await expect(notSent(page)).toContainText('all sent');
  });

  await test.step('without a network it asks who is holding it, and a wrong PIN opens nothing', async () => {
    await context.setOffline(true);
    await handOver(page);
    await page.reload();
    await expect(page.getByRole('heading', { name: 'Who is holding this device?' })).toBeVisible();
    await accessible(page);
    await keepScreenshot(page, 'shared-tablet-asks');
    await page.locator('li button').filter({ hasText: 'Noor' }).click();
    await press(page, '0000', 'Open');
    await expect(page.getByText(/That is not the PIN/)).toBeVisible();
    await expect(page.getByText(POUR)).toHaveCount(0);
  });

  await test.step('Noor records, hands over, and Tomasz sees that something of hers waits, not what', async () => {
    await hold(page, /Noor/, '2580');
    await keepNote(page, pourPath, 'Form oil on the bars at C2, wiped off');
    await handOver(page);
    await expect(page.getByText(/Noor.*1 entry not sent/)).toBeVisible();
    await hold(page, /Tomasz/, '7391');
    await page.goto(appAddress(pourPath));
    await expect(page.getByText('1 entry of this pour by Noor Valdés')).toBeVisible();
    await page.goto(appAddress(`${pourPath}/events`));
    await expect(page.getByRole('heading', { level: 1, name: 'On site' })).toBeVisible();
    await expect(page.getByText('Form oil on the bars')).toHaveCount(0);
    await keepNote(page, pourPath, 'Bars at C3 tied again');
  });

  await test.step('with a network only Tomasz’ is sent: it is his session', async () => {
    await context.setOffline(false);
    await page.goto(appAddress(pourPath));
    await expect(notSent(page)).toContainText('all sent', { timeout: 60_000 });
    await expect(page.getByText('1 entry of this pour by Noor Valdés')).toBeVisible();
  });

  await test.step('Noor’s waits until she signs in, and then goes out from the same screen', async () => {
    await handOver(page);
    await hold(page, /Noor/, '2580');
    await page.goto(appAddress(pourPath));
    await expect(page.getByText('1 entry waits for Noor Valdés to sign in')).toBeVisible({ timeout: 60_000 });
    await expect(page.getByText(/Tomasz Brük’s session/)).toBeVisible();
    await accessible(page);
    await keepScreenshot(page, 'shared-tablet-waits');
    await page.getByRole('link', { name: 'Sign in as Noor Valdés' }).click();
    await expect(page).toHaveURL(/sign-in/);
    await signIn(page, 'inspector', new URL(page.url()).searchParams.get('next') ?? '');
    expect(new URL(page.url()).pathname).toBe(pourPath);
    await expect(notSent(page)).toContainText('all sent', { timeout: 60_000 });
  });

  await test.step('the record names each author', async () => {
    const authors = await page.evaluate(async (pourId) => {
      const index = (await (await fetch('/api/sync/index')).json()) as {
        projects: { id: string; people: { id: string; name: string }[] }[];
      };
      const project = index.projects[0]!;
      const answer = await fetch('/api/sync/pull', {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({
          protocol: 1,
          projectId: project.id,
          project: { after: 0, headHash: null },
          pours: [{ pourId, planRevision: 0, after: 0, headHash: null }],
        }),
      });
      const { pours } = (await answer.json()) as {
        pours: { entries: { type: string; authorId: string; body: { text?: string } }[] }[];
      };
      return pours[0]!.entries
        .filter((entry) => entry.type === 'note')
        .map((entry) => [entry.body.text, project.people.find(({ id }) => id === entry.authorId)?.name]);
    }, pourPath.split('/').at(-1)!);
    expect(authors).toContainEqual(['Form oil on the bars at C2, wiped off', 'Noor Valdés']);
    expect(authors).toContainEqual(['Bars at C3 tied again', 'Tomasz Brük']);
  });
  await context.close();
});
