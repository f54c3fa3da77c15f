import { AxeBuilder } from '@axe-core/playwright';
import { chromium, type Browser, type Page } from '@playwright/test';
import { afterAll, afterEach, beforeAll, expect, inject } from 'vitest';

export const DESK = { width: 1280, height: 900 };
export const PHONE = { width: 390, height: 844 };
const PASSWORD = 'witness-mark-demo';

type Mailbox = 'owner' | 'manager' | 'tech' | 'books' | 'counter';
type Look = { viewport?: typeof DESK; dark?: boolean };

/** A real Chromium for a file of tests; whatever the console complains of fails the test in which it happened. */
export function useBrowser() {
  let browser: Browser;
  const complaints: string[] = [];
  beforeAll(async () => {
    browser = await chromium.launch({
      executablePath: '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    });
  });
  afterAll(() => browser.close());
  afterEach(async () => {
    await Promise.all(browser.contexts().map((context) => context.close()));
    expect(complaints.splice(0)).toEqual([]);
  });

  async function open({ viewport = DESK, dark = false }: Look = {}): Promise<Page> {
    const context = await browser.newContext({
      viewport,
      colorScheme: dark ? 'dark' : 'light',
      reducedMotion: 'reduce',
      hasTouch: viewport === PHONE,
      baseURL: inject('address'),
      locale: 'en-US',
    });
    const page = await context.newPage();
    page.setDefaultTimeout(20_000);
    page.on('console', (message) => {
      // The browser notes every failed request itself; those that a test provokes are its own to look at.
      if (message.type() === 'error' && !message.text().startsWith('Failed to load resource')) {
        complaints.push(message.text());
      }
    });
    page.on('pageerror', (error) => complaints.push(error.message));
    return page;
  }

  return {
    open,
    /** A page on which a person of the demo shop is signed in. */
    async signedIn(mailbox: Mailbox, look: Look = {}): Promise<Page> {
      const page = await open(look);
      await page.goto('/sign-in');
      await page.getByLabel('E-mail').fill(`${mailbox}@millrace.example`);
      await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
      await page.getByRole('button', { name: 'Sign in' }).click();
      await page.waitForURL((url) => url.pathname !== '/sign-in');
      return page;
    },
    /** The same without the way through the form: straight to a page, once it is whole; or to none yet. */
    async at(mailbox: Mailbox, path: string | null, look: Look = {}): Promise<Page> {
      const page = await open(look);
      await page.request.post('/api/v1/session', {
        data: { email: `${mailbox}@millrace.example`, password: PASSWORD },
      });
      if (path !== null) await goTo(page, path);
      return page;
    },
  };
}

/** Opens an address and waits for the page with its charts. */
export async function goTo(page: Page, path: string): Promise<void> {
  await page.goto(path);
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await page.waitForLoadState('networkidle');
  // A chart whose code has come is drawn a moment later.
  await page.locator('figure [data-skeleton]').first().waitFor({ state: 'detached' });
}

/** What the API answers the person of this page. */
export async function answerOf<Answer>(page: Page, path: string): Promise<Answer> {
  const answer = await page.request.get(`/api/v1${path}`);
  expect(answer.status()).toBe(200);
  return (await answer.json()) as Answer;
}

/** Text as people read it: thin and hard spaces are spaces. */
export const plain = (text: string): string => text.replace(/\s+/g, ' ').trim();

const AXE_TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

/** Nothing that axe knows to hinder people, by WCAG 2.2 AA. */
export async function expectNoBarriers(
  page: Page,
  of: 'everything' | 'colors' = 'everything',
): Promise<void> {
  const axe = new AxeBuilder({ page });
  const { violations } = await (
    of === 'colors' ? axe.withRules(['color-contrast', 'link-in-text-block']) : axe.withTags(AXE_TAGS)
  ).analyze();
  expect(
    violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(' | ')}`),
  ).toEqual([]);
}
