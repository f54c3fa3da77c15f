import type { Page } from '@playwright/test';
import type { RouteObject } from 'react-router';
import { describe, expect, it } from 'vitest';
import { routes } from '../../src/router';
import { answerOf, DESK, expectNoBarriers, goTo, PHONE, useBrowser } from './browser';

const browser = useBrowser();

type Row = { id: string; name?: string; kind?: string; unit?: { id: string } | null };

/** The first of a list that is like that. */
async function first(page: Page, list: string, isLike: (row: Row) => boolean = () => true): Promise<Row> {
  const { data } = await answerOf<{ data: Row[] }>(page, list);
  const found = data.find(isLike);
  if (!found) throw new Error(`the demo shop has none in ${list}`);
  return found;
}

type Address = string | ((page: Page) => Promise<string>);

/** Every route of the application with addresses on which it is looked at. */
const ADDRESSES: Record<string, readonly Address[]> = {
  '/sign-in': ['/sign-in'],
  '/forgot': ['/forgot'],
  '/set-password': ['/set-password?token=made-up', '/set-password'],
  '/': ['/', '/?month=2026-06'],
  '/comebacks': ['/comebacks'],
  '/models': ['/models'],
  '/models/:id': [async (page) => `/models/${(await first(page, '/models')).id}`],
  '/parts': ['/parts'],
  '/parts/:component': [
    async (page) =>
      `/parts/${(await first(page, '/components?limit=1000', ({ name }) => name === 'PTO clutch')).id}`,
  ],
  '/cascades': ['/cascades'],
  '/cascades/:id': [
    async (page) => `/cascades/${(await first(page, '/cascades', ({ kind }) => kind === 'cascade')).id}`,
    async (page) => `/cascades/${(await first(page, '/cascades', ({ kind }) => kind === 'together')).id}`,
  ],
  '/repairs': ['/repairs', '/repairs?q=no+such+words'],
  '/repairs/:id': [async (page) => `/repairs/${(await first(page, '/repairs')).id}`],
  '/units/:id': [
    async (page) => `/units/${(await first(page, '/repairs', ({ unit }) => Boolean(unit))).unit?.id}`,
  ],
  '/imports': ['/imports'],
  '/imports/:id': [async (page) => `/imports/${(await first(page, '/imports')).id}`],
  '/settings/:section?': [
    '/settings/you',
    '/settings/shop',
    '/settings/people',
    '/settings/technicians',
    '/settings/families',
    '/settings/keys',
    '/settings/mail',
    '/settings/audit',
  ],
  '/help': ['/help'],
  '/*': ['/nowhere', '/models/00000000-0000-4000-8000-000000000000'],
};

const OF_NOBODY = ['/sign-in', '/forgot', '/set-password'];

/** The patterns of all routes that show something. */
function patternsOf(of: readonly RouteObject[], parent = ''): string[] {
  return of.flatMap((route) => {
    const pattern = `${parent}/${route.path ?? ''}`.replace(/\/+/g, '/').replace(/(.)\/$/, '$1');
    return route.children ? patternsOf(route.children, pattern) : [pattern];
  });
}

async function expectWhole(page: Page): Promise<void> {
  expect(await page.title()).toMatch(/^\S.+ · Witness Mark$/);
  expect(await page.getByRole('heading', { level: 1 }).count()).toBe(1);
  const [width, room] = await page.evaluate(() => [document.documentElement.scrollWidth, innerWidth]);
  expect(width).toBeLessThanOrEqual(room ?? 0);
}

describe('every page', () => {
  it('of the router is looked at here', () => {
    expect(Object.keys(ADDRESSES).sort()).toEqual(patternsOf(routes).sort());
  });

  for (const [pattern, addresses] of Object.entries(ADDRESSES)) {
    it(`${pattern} is whole and without barriers: desk and phone, light and dark`, async () => {
      for (const viewport of [DESK, PHONE]) {
        const page = OF_NOBODY.includes(pattern)
          ? await browser.open({ viewport })
          : await browser.at('owner', null, { viewport });
        for (const address of addresses) {
          await page.emulateMedia({ colorScheme: 'light' });
          await goTo(page, typeof address === 'string' ? address : await address(page));
          await expectWhole(page);
          await expectNoBarriers(page);
          // In the dark nothing changes but the colors.
          await page.emulateMedia({ colorScheme: 'dark' });
          await expectNoBarriers(page, 'colors');
        }
        await page.context().close();
      }
    });
  }
});
