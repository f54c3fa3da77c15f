import type { Page } from '@playwright/test';
import { describe, expect, it } from 'vitest';
import { PHONE, useBrowser } from './browser';

const browser = useBrowser();

const OF_EVERYONE = ['Help', 'Settings'];
const OF_FIGURES = ['This month', 'Comebacks', 'Models', 'Parts', 'Cascades', 'Repairs'];

async function screensOf(page: Page): Promise<string[]> {
  const screens = page.getByRole('navigation', { name: 'Screens' });
  await screens.waitFor();
  return screens.getByRole('link').allInnerTexts();
}

async function signIn(page: Page, email: string, password: string): Promise<void> {
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}

describe('signing in', () => {
  it.each([
    ['owner', 'owner', [...OF_FIGURES, 'Imports', ...OF_EVERYONE]],
    ['manager', 'service manager', [...OF_FIGURES, 'Imports', ...OF_EVERYONE]],
    ['books', 'accountant', [...OF_FIGURES, 'Imports', ...OF_EVERYONE]],
    ['tech', 'technician', [...OF_FIGURES, ...OF_EVERYONE]],
    ['counter', 'counter', ['Models', 'Repairs', ...OF_EVERYONE]],
  ] as const)('shows %s the screens of the %s', async (mailbox, role, screens) => {
    const page = await browser.signedIn(mailbox);
    expect(await screensOf(page)).toEqual(screens);
    expect(await page.getByRole('banner').innerText()).toContain(`, ${role}`);
  });

  it('says what is wrong, keeps the address, and goes on to the page that was asked for', async () => {
    const page = await browser.open();
    await page.goto('/parts?model=');
    await page.waitForURL((url) => url.pathname === '/sign-in');
    await signIn(page, 'owner@millrace.example', 'not-the-password');
    await page.getByRole('alert').waitFor();
    expect(await page.getByRole('alert').innerText()).toMatch(/password/i);
    expect(await page.getByLabel('E-mail').inputValue()).toBe('owner@millrace.example');

    await signIn(page, 'owner@millrace.example', 'witness-mark-demo');
    await page.getByRole('heading', { level: 1, name: 'Parts' }).waitFor();
    expect(new URL(page.url()).pathname).toBe('/parts');
  });

  it('signs out from a phone’s drawer, and nothing stays behind', async () => {
    const page = await browser.signedIn('owner', { viewport: PHONE });
    await page.getByRole('button', { name: 'All screens' }).click();
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.waitForURL((url) => url.pathname === '/sign-in');
    await page.goto('/repairs');
    await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor();
    const answer = await page.request.get('/api/v1/repairs');
    expect(answer.status()).toBe(401);
  });
});

describe('a person who is new', () => {
  it('is invited, asks for a link anew, sets a password by it once, and comes in', async () => {
    const [email, password] = ['nell.orrin@millrace.example', 'oak bench, cold tea 7'];
    const owner = await browser.at('owner', '/settings/people');
    await owner.getByRole('button', { name: 'Invite someone' }).click();
    const dialog = owner.getByRole('dialog', { name: 'Invite someone' });
    await dialog.getByLabel('Name').fill('Nell Orrin');
    await dialog.getByLabel('E-mail').fill(email);
    await dialog.getByLabel('Role').click();
    await owner.getByRole('option', { name: 'counter' }).click();
    await dialog.getByRole('button', { name: 'Send the invitation' }).click();
    await dialog.waitFor({ state: 'hidden' });
    const row = owner.getByRole('row').filter({ hasText: email });
    expect(await row.innerText()).toContain('invited, no password yet');

    const nell = await browser.open();
    await nell.goto('/sign-in');
    await nell.getByRole('link', { name: 'Forgot the password' }).click();
    await nell.getByLabel('E-mail').fill(email);
    await nell.getByRole('button', { name: 'Send the link' }).click();
    await nell.getByRole('status').filter({ hasText: email }).waitFor();

    await owner.goto('/settings/mail');
    const mails = owner.getByRole('row').filter({ hasText: email });
    await mails.first().waitFor();
    expect(await mails.count()).toBe(2);
    await mails.first().getByRole('button').click();
    const mail = await owner.getByRole('dialog').innerText();
    const link = /\S+\/set-password\?token=\S+/.exec(mail)?.[0] ?? 'no link in the message';
    expect(new URL(link).origin).toBe(new URL(owner.url()).origin);

    await nell.goto(link);
    await nell.getByLabel('New password').fill('short');
    await nell.getByRole('button', { name: 'Set the password' }).click();
    await nell
      .getByText(/at least 12/i)
      .last()
      .waitFor();
    // The hint says it too, so that only the mark tells that the check has been made.
    await nell.locator('input[aria-invalid="true"]').first().waitFor();
    await nell.getByLabel('New password').fill(password);
    await nell.getByRole('button', { name: 'Set the password' }).click();
    await nell.waitForURL((url) => url.pathname === '/sign-in');
    await signIn(nell, email, password);
    await nell.getByRole('heading', { level: 1, name: 'Repairs' }).waitFor();
    expect(await screensOf(nell)).toEqual(['Models', 'Repairs', ...OF_EVERYONE]);

    await nell.goto(link);
    await nell.getByLabel('New password').fill(`${password}!`);
    await nell.getByRole('button', { name: 'Set the password' }).click();
    expect(await nell.getByRole('alert').innerText()).toContain('does not work any more');
    await nell.getByRole('link', { name: 'Ask for a new link' }).click();
    await nell.waitForURL((url) => url.pathname === '/forgot');
  });
});
