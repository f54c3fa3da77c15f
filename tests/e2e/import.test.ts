import type { Page } from '@playwright/test';
import { describe, expect, it } from 'vitest';
import { DESK, expectNoBarriers, PHONE, useBrowser } from './browser';

const browser = useBrowser();

const NATIVE = `repair_number,closed_on,unit_serial,maker,model,meter_hours,complaint,correction,part_number,quantity,part_amount
E2E-1,2026-05-04,E2E-100,Tarnlow,TL-42,101.5,no start,battery replaced,E2E-B1,1,80.00
E2E-2,2026-05-05,E2E-101,Tarnlow,TL-42,55,blades quit,belt replaced,E2E-X2,many,30.00
E2E-3,2026-05-06,E2E-102,Tarnlow,TL-42,77,smokes,oil changed,E2E-X3,1,12.00
`;

/** Another program's words, day and month that cannot be told apart, and decimal commas. */
const FOREIGN = `RO #;Wrapped up;Serial No;Make;Mdl;Hrs;Customer Concern;Work Performed;Part No;Qty;Ext Price
F-1;03/04/2026;E2E-200;Tarnlow;TL-42;120,5;will not crank;cleaned terminals;;;
F-2;05/06/2026;E2E-201;Tarnlow;TL-42;44;leaks fuel;new line;E2E-FL9;2;14,50
F-3;02/01/2026;E2E-202;Tarnlow;TL-42;300,1;deck rattles;spindle;E2E-SP1;1;64,00
`;

async function choose(page: Page, name: string, text: string): Promise<void> {
  await page.goto('/imports');
  await page
    .getByLabel('File of records')
    .setInputFiles({ name, mimeType: 'text/csv', buffer: Buffer.from(text) });
  await page.getByRole('heading', { name: `What ${name} says` }).waitFor();
}

/** Brings the chosen file in and waits until the figures include it. */
async function bringIn(page: Page, name: string): Promise<void> {
  await page.getByRole('button', { name: 'Bring it in' }).click();
  await page.getByRole('heading', { level: 1, name }).waitFor();
  await page.getByText('The figures include it.').waitFor({ timeout: 120_000 });
}

const cells = (page: Page, row: string) =>
  page.getByRole('row', { name: row }).getByRole('cell').allInnerTexts();

describe('bringing in a file', () => {
  it('goes from a native file to the figures, shows what was rejected, and takes it back', async () => {
    const page = await browser.signedIn('manager');
    await choose(page, 'may.csv', NATIVE);

    await page.getByRole('button', { name: 'Try it without importing' }).click();
    await page.getByText('Tried with 3 rows: nothing was taken in.').waitFor();
    expect(await cells(page, 'E2E-2')).toContain('“many”');
    await expectNoBarriers(page);

    await bringIn(page, 'may.csv');
    const status = page.getByRole('status').filter({ hasText: '2 repairs taken in' });
    expect(await status.innerText()).toContain('3 rows read');
    const rejected = await cells(page, 'E2E-2');
    expect(rejected).toContain('quantity');
    expect(rejected.at(-1)).not.toBe('');
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('link', { name: 'Take these rows as a file' }).click(),
    ]);
    expect(download.suggestedFilename()).toMatch(/^rejected-.*\.csv$/);

    await page.getByRole('link', { name: 'See the repairs' }).click();
    await page.getByRole('searchbox', { name: 'Number, name, words' }).fill('E2E-1');
    await page.getByRole('button', { name: 'Find' }).click();
    await page.getByRole('link', { name: 'E2E-1', exact: true }).click();
    await page.getByRole('heading', { level: 1, name: 'Repair E2E-1' }).waitFor();
    await page.getByText('battery replaced').waitFor();

    await page.goto('/imports');
    await page.getByRole('link', { name: 'may.csv' }).first().click();
    await page.getByRole('heading', { level: 1, name: 'may.csv' }).waitFor();
    await page.getByRole('button', { name: 'Take this import back' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Take it back' }).click();
    await page.getByText('It was taken back.').waitFor();
    await page.goto('/repairs?q=E2E-1');
    await page.getByText('No repair is like that.').waitFor();
  }, 240_000);

  it('asks of a foreign header only what the file leaves open', async () => {
    const page = await browser.signedIn('manager');
    await choose(page, 'export.csv', FOREIGN);

    const bring = page.getByRole('button', { name: 'Bring it in' });
    expect(await bring.isDisabled()).toBe(true);
    await page.getByRole('combobox', { name: 'What “Wrapped up” means' }).click();
    await page.getByRole('option', { name: 'Closed', exact: true }).click();
    await page.getByText('How are the dates written?').first().waitFor();
    await page.getByRole('radio', { name: /^month\/day\/year/ }).check();
    expect(await page.getByRole('radio', { name: '12,50' }).isChecked()).toBe(true);
    await expectNoBarriers(page);
    await bringIn(page, 'export.csv');

    await page.goto('/repairs?q=F-2');
    await page.getByRole('link', { name: 'F-2', exact: true }).click();
    await page.getByRole('heading', { level: 1, name: 'Repair F-2' }).waitFor();
    await page.getByText('done May 6, 2026').waitFor();
    expect(await page.getByRole('cell', { name: '$14.50' }).count()).toBe(1);

    await choose(page, 'export-again.csv', FOREIGN);
    await page.getByText('a file with this header row was confirmed before').waitFor();
    expect(await bring.isEnabled()).toBe(true);
  }, 240_000);

  it('lets the accountant read what came in, and says to the technician that it is not theirs', async () => {
    const books = await browser.signedIn('books', { viewport: PHONE, dark: true });
    await books.goto('/imports');
    await books.getByRole('link', { name: 'millrace-repairs.csv' }).click();
    await books.getByRole('heading', { level: 1, name: 'millrace-repairs.csv' }).waitFor();
    expect(await books.getByRole('button', { name: 'Take this import back' }).count()).toBe(0);
    await expectNoBarriers(books);
    const tech = await browser.signedIn('tech', { viewport: DESK });
    await tech.goto('/imports');
    await tech.getByRole('heading', { name: 'Your role does not include this' }).waitFor();
  }, 120_000);
});
