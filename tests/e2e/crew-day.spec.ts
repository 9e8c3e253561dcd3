import AxeBuilder from '@axe-core/playwright';
import { expect, test, type Page } from '@playwright/test';
import { keepScreenshot } from './keep-screenshot';
import { picture } from './on-site';
import { laptop, phone, signedIn } from './sign-in';

const POUR = 'P-014';
const notSent = (page: Page) => page.getByRole('banner').getByRole('link').last();

async function accessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  expect(violations.map(({ id, nodes }) => [id, nodes.map(({ html }) => html)])).toEqual([]);
}

test('crew see their list in Spanish without a signal, and report a correction with a photograph', async ({
  browser,
}) => {
  const { page, context } = await signedIn(browser, 'crew', phone, '/field');
  await page.getByRole('link', { name: new RegExp(POUR) }).click();
  await page.getByRole('button', { name: 'Español' }).click();
  await expect(page.getByRole('heading', { level: 1, name: `Lista de correcciones ${POUR}` })).toBeVisible();
  await accessible(page);
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await expect(notSent(page)).toContainText('todo enviado');
  const pourId = new URL(page.url()).pathname.split('/').at(-1)!;

  await test.step('a low reading is shown where it is on the face', async () => {
    await context.setOffline(true);
    await page.reload();
    const item = page.getByRole('listitem').filter({ hasText: 'Recubrimiento insuficiente' }).first();
    await expect(item.getByRole('img', { name: /Soffit/ })).toBeVisible();
    await expect(item.getByText(/desde la izquierda/)).toBeVisible();
    await keepScreenshot(page, 'crew-list');
  });

  await test.step('the report says beside the field what is missing, and is kept with a photograph', async () => {
    const item = page.getByRole('listitem').filter({ hasText: 'Two chairs tipped' });
    await item.getByRole('link', { name: 'Avisar que está corregido' }).click();
    await page.getByRole('button', { name: 'Avisar', exact: true }).click();
    await expect(page.getByText('Escriba qué se hizo.')).toBeVisible();
    await accessible(page);
    await page.getByLabel('Qué se hizo').fill('Se enderezaron las sillas');
    await page.getByRole('button', { name: 'Avisar', exact: true }).click();
    await expect(page.getByText('Avisado', { exact: true })).toBeVisible();
    await page
      .getByLabel('Tomar la foto')
      .setInputFiles({ name: 'sillas.jpg', mimeType: 'image/jpeg', buffer: await picture() });
    await expect(page.getByText('Foto guardada en este dispositivo.')).toBeVisible();
    await page.getByRole('link', { name: 'A la lista' }).click();
    await expect(page.getByText('Avisado. Se envía cuando haya red.')).toBeVisible();
    await expect(notSent(page)).toContainText('3 sin enviar');
  });

  await test.step('it goes out by itself, leaves the list, and waits for the inspector', async () => {
    await context.setOffline(false);
    await expect(notSent(page)).toContainText('todo enviado', { timeout: 60_000 });
    await expect(page.getByText('Two chairs tipped')).toHaveCount(0);
    await expect(page.getByRole('heading', { name: 'Avisado, el inspector vuelve a revisar' })).toBeVisible();
    await keepScreenshot(page, 'crew-list-after');
  });

  await test.step('the office sees it, with its author', async () => {
    const office = await signedIn(browser, 'engineer', laptop, `/pours/${pourId}`);
    await expect(office.page.getByText('Se enderezaron las sillas').first()).toBeAttached();
    await office.context.close();
  });
  await context.close();
});
