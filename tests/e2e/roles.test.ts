import type { Page } from '@playwright/test';
import { describe, expect, it } from 'vitest';
import type { Named } from '../../shared/basics';
import type { RepairListed } from '../../shared/repairs';
import { answerOf, expectNoBarriers, goTo, PHONE, useBrowser } from './browser';

const browser = useBrowser();

/** A page of the application, with its navigation, that says it is not this role's, and nothing of its content. */
async function expectNotTheirs(page: Page, path: string): Promise<void> {
  await page.goto(path);
  await page.getByRole('heading', { level: 1, name: 'Your role does not include this' }).waitFor();
  expect(await page.title()).toBe('Your role does not include this · Witness Mark');
  expect(await page.getByRole('button', { name: 'Try again' }).count()).toBe(0);
  await expectNoBarriers(page);
}

describe('a technician', () => {
  it('gets a plain page where imports and the shop’s settings would be', async () => {
    const page = await browser.at('tech', '/settings');
    expect(
      await page.getByRole('navigation', { name: 'Settings' }).getByRole('link').allInnerTexts(),
    ).toEqual(['You', 'Families']);
    for (const path of [
      '/imports',
      '/settings/people',
      '/settings/keys',
      '/settings/mail',
      '/settings/audit',
    ]) {
      await expectNotTheirs(page, path);
    }
  });

  it('sees comebacks of their own repairs and decides nothing', async () => {
    const page = await browser.at('tech', '/comebacks');
    expect(await page.getByText('of your own repairs').count()).toBeGreaterThan(0);
    expect(await page.getByRole('button', { name: /^Decide|^Look at/ }).count()).toBe(0);
  });
});

describe('the counter', () => {
  it('begins at the repairs, opens one, and sees no figures', async () => {
    const page = await browser.signedIn('counter', { viewport: PHONE });
    await page.waitForURL((url) => url.pathname === '/repairs');
    const { data } = await answerOf<{ data: RepairListed[] }>(page, '/repairs?limit=1');
    await page
      .getByRole('link', { name: data[0]?.number ?? 'a repair', exact: true })
      .first()
      .click();
    await page.getByRole('heading', { level: 1, name: `Repair ${data[0]?.number}` }).waitFor();
    for (const path of ['/comebacks', '/cascades', '/imports']) await expectNotTheirs(page, path);

    // Of a part they may know the repairs, not how long it lasts.
    const components = await answerOf<{ data: Named[] }>(page, '/components?limit=1');
    await page.goto(`/parts/${components.data[0]?.id}`);
    await page.waitForURL((url) => url.pathname === '/repairs' && url.searchParams.has('componentId'));
  });
});

describe('an accountant', () => {
  it('reads what was imported and brings nothing in', async () => {
    const page = await browser.at('books', '/imports');
    expect(await page.getByLabel('File of records').count()).toBe(0);
    await goTo(page, '/parts');
    expect(await page.getByRole('region', { name: 'Components' }).getByRole('combobox').count()).toBe(0);
  });
});
