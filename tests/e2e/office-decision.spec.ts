import { expect, test } from '@playwright/test';
import { ask, inspectAndSign, planPour, reading, record } from './office-pour';
import { appAddress, DEMO_PASSWORD, laptop, phone, signedIn } from './sign-in';

test.describe.serial('a decision and what it asks for after the pour', () => {
  let pourId = '';
  let sheet = '';

  test('can be signed once requirement, extent and photographs were opened, with the keyboard alone', async ({
    browser,
  }) => {
    const boss = await signedIn(browser, 'superintendent', laptop, '/pours');
    pourId = await planPour(boss.page, 'P-941', 'Ticket hall slab');
    await inspectAndSign(browser, pourId);
    await boss.context.close();
    const site = await signedIn(browser, 'inspector', laptop, `/pours/${pourId}`);
    const point = await site.page
      .locator('tr[id^="point-"]')
      .first()
      .evaluate((row) => row.id.slice('point-'.length));
    const low = await record(site.page, pourId, 'reading', reading(point, 34));
    sheet = `/nonconformances/${await record(site.page, pourId, 'nonconformance', {
      title: 'Cover 34 mm at the first point',
      about: [
        { kind: 'point', id: point },
        { kind: 'entry', id: low },
      ],
      where: { elementId: 'slab', faceId: 'slab-top', text: 'Top, first point' },
      extent: 'One bar over 600 mm',
      description: '',
      proposal: 'Leave it and coat the top',
      neededBy: null,
    })}`;
    await site.context.close();

    const { page, context } = await signedIn(browser, 'engineer', phone, sheet);
    const sign = page.getByRole('button', { name: 'Sign the decision' });
    await expect(sign).toBeDisabled();
    const parts = ['Requirement and clause', 'Extent, and where', 'Photographs'];
    for (const [index, part] of parts.entries()) {
      await expect(page.getByText(/^Before it can be signed, open above:/)).toBeVisible();
      await page.locator('summary').filter({ hasText: part }).focus();
      await page.keyboard.press('Enter');
      if (index < parts.length - 1) await expect(sign).toBeDisabled();
    }
    await expect(sign).toBeEnabled();

    // A second look may close a part again: what was opened stays opened.
    await page.keyboard.press('Enter');
    await expect(sign).toBeEnabled();

    // What is missing is said beside each field, and nothing that was typed is lost.
    await page.getByLabel('How far it reaches').fill('One bar over 650 mm');
    await page.getByLabel('Licence number').fill('');
    await page.getByRole('button', { name: 'Add a condition' }).press('Enter');
    await sign.press('Enter');
    await expect(page.getByText('Choose what is to be done.')).toBeVisible();
    await expect(page.getByText('Your password signs it.')).toBeVisible();
    for (const field of ['Reason', 'Licence number', 'What', 'Met when'])
      await expect(page.getByLabel(field, { exact: true })).toHaveAccessibleDescription(
        'Write something here.',
      );
    await expect(page.getByLabel('How far it reaches')).toHaveValue('One bar over 650 mm');
    await page.getByRole('button', { name: 'Remove condition 1' }).press('Enter');
    await page.getByLabel('Licence number').fill('SE 40 117');

    await page.getByRole('radio', { name: 'Use as is' }).focus();
    await page.keyboard.press('Space');
    await page.getByLabel('Reason').fill('Strength is not touched at 34 mm.');
    await page.getByRole('checkbox', { name: /34 mm/ }).focus();
    await page.keyboard.press('Space');
    await page.getByRole('button', { name: 'Add a condition' }).press('Enter');
    const condition = page.getByRole('group', { name: 'Conditions' });
    await condition.getByLabel('What', { exact: true }).fill('Coat the top');
    await condition.getByLabel('Met when').fill('Two coats, thickness on record');
    await condition.getByLabel('Stage').selectOption({ label: 'after the pour' });
    await context.setOffline(true);
    await page.getByLabel('Your password').fill(DEMO_PASSWORD);
    await sign.press('Enter');
    await expect(page.getByText('What you typed is kept here; try again.')).toBeVisible();
    await context.setOffline(false);
    await page.getByLabel('Your password').fill('not the password');
    await sign.press('Enter');
    await expect(page.getByText('That password is not right. Nothing was signed.')).toBeVisible();
    await expect(page.getByLabel('Reason')).toHaveValue('Strength is not touched at 34 mm.');
    await page.getByLabel('Your password').fill(DEMO_PASSWORD);
    await sign.press('Enter');
    await expect(page.getByText('accepted', { exact: true }).first()).toBeVisible();
    await expect(page.getByRole('heading', { name: 'Decisions so far' })).toBeVisible();
    await expect(page.getByText('Use as is', { exact: true })).toBeVisible();
    await expect(page.getByText('Reaches: One bar over 650 mm')).toBeVisible();
    await context.close();
  });

  test('is not offered to anybody but the engineer', async ({ browser }) => {
    // Every role is tried against the route elsewhere; here, that the sheet offers it to none of them.
    for (const who of ['superintendent', 'viewer'] as const) {
      const { page, context } = await signedIn(browser, who, laptop, sheet);
      await expect(page.getByRole('heading', { level: 1, name: /Cover 34 mm/ })).toBeVisible();
      await expect(page.getByRole('button', { name: 'Sign the decision' })).toHaveCount(0);
      const tried = await ask(page, 'POST', `/api/pours/${pourId}/dispositions`, {
        body: {},
        password: DEMO_PASSWORD,
      });
      expect([400, 403], who).toContain(tried.status);
      await context.close();
    }
  });

  test('a condition after the pour is found by engineer and inspector, and verified by the inspector', async ({
    browser,
  }) => {
    const boss = await signedIn(browser, 'superintendent', laptop, `/pours/${pourId}`);
    const started = new Date(Date.now() - 60_000).toISOString();
    await record(boss.page, pourId, 'placement', { event: 'started', at: started, elementIds: null });
    await record(boss.page, pourId, 'placement', {
      event: 'finished',
      at: new Date().toISOString(),
      elementIds: null,
    });
    await boss.context.close();

    const engineer = await signedIn(browser, 'engineer', laptop, '/nonconformances?show=conditions');
    await engineer.page.getByRole('link', { name: /Cover 34 mm/ }).click();
    await expect(engineer.page.getByText('Not verified yet; the inspector verifies it.')).toBeVisible();
    await expect(engineer.page.getByRole('button', { name: /^Verify/ })).toHaveCount(0);

    const { page, context } = await signedIn(browser, 'inspector', phone, `/pours/${pourId}`);
    await page.getByRole('link', { name: '1 condition is still to be verified' }).click();
    await page.getByRole('button', { name: 'Verify: Coat the top' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('button', { name: 'Record it' }).click();
    await expect(dialog.getByText('Choose one.')).toBeVisible();
    await dialog.getByLabel('Outcome').selectOption({ label: 'Met' });
    await dialog.getByLabel(/^What was seen/).fill('Two coats, 210 micrometres');
    await dialog.getByRole('button', { name: 'Record it' }).click();
    await expect(dialog).toBeHidden();
    await expect(page.locator('#conditions')).toContainText('Two coats, 210 micrometres');
    await expect(page.getByRole('button', { name: /^Verify/ })).toHaveCount(0);
    await context.close();

    // The engineer's open sheet follows.
    await expect(engineer.page.getByText('Two coats, 210 micrometres').first()).toBeVisible();
    await engineer.page.goto(appAddress('/nonconformances?show=conditions'));
    await expect(engineer.page.getByRole('link', { name: /Cover 34 mm/ })).toHaveCount(0);
    await engineer.context.close();
  });
});
