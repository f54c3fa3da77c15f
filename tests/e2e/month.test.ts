import type { Page } from '@playwright/test';
import { describe, expect, it } from 'vitest';
import type { MonthReview } from '../../shared/reports';
import { answerOf, goTo, PHONE, plain, useBrowser } from './browser';

const browser = useBrowser();

const sentenceOf = async (page: Page) => plain(await page.locator('[data-finding]').innerText());

/** What the API says of the month that a page is about, in the words of its sentence. */
function wordsOf(review: MonthReview): { share: string; repairs: string } {
  const row = review.rows.find(({ month }) => month === review.month);
  if (!row || row.rate === null) throw new Error(`no rate of ${review.month}`);
  return { share: `${(row.rate * 100).toFixed(1)} %`, repairs: `the ${row.size} repairs` };
}

describe('This month', () => {
  it('opens with this shop’s rate, the same as the API’s, on the chart and in its table', async () => {
    const page = await browser.signedIn('owner');
    await goTo(page, '/');
    const review = await answerOf<MonthReview>(page, '/reports/month');
    const { share, repairs } = wordsOf(review);
    const sentence = await sentenceOf(page);
    expect(sentence.startsWith(`${share} of ${repairs} done in`)).toBe(true);

    const picture = page.getByRole('region', { name: /^Came back within/ });
    await picture.getByRole('figure').locator('svg').first().waitFor();
    await picture.getByRole('button', { name: 'as a table' }).click();
    const judged = picture
      .getByRole('row')
      .filter({ hasText: share })
      .filter({ hasText: repairsIn(review) });
    expect(await judged.count()).toBeGreaterThan(0);
    expect(await picture.getByRole('figure').count()).toBe(0);
    await picture.getByRole('button', { name: 'as a picture' }).click();
    await picture.getByRole('figure').locator('svg').first().waitFor();
  });

  it('goes to another month by its address, and stays there', async () => {
    const page = await browser.at('owner', '/');
    const latest = await sentenceOf(page);
    await page.getByRole('combobox', { name: 'Month' }).click();
    await page.getByRole('option').nth(8).click();
    await page.waitForURL((url) => url.searchParams.has('month'));
    const month = new URL(page.url()).searchParams.get('month') ?? '';
    const { share, repairs } = wordsOf(await answerOf<MonthReview>(page, `/reports/month?month=${month}`));
    await expect.poll(() => sentenceOf(page), { timeout: 20_000 }).toContain(`${share} of ${repairs}`);
    expect(await sentenceOf(page)).not.toBe(latest);
    await page.reload();
    await page.locator('[data-finding]').waitFor();
    expect(await sentenceOf(page)).toContain(`${share} of ${repairs}`);
    await page.goBack();
    await expect.poll(() => sentenceOf(page), { timeout: 20_000 }).toBe(latest);
  });

  it('leads from what drives it to that part, and from what needs doing to its list', async () => {
    const page = await browser.at('owner', '/');
    const review = await answerOf<MonthReview>(page, '/reports/month');
    const [driver] = review.drivers;
    const [todo] = review.todos;
    await page
      .getByRole('region', { name: 'What drives it' })
      .getByRole('row')
      .nth(1)
      .getByRole('link')
      .click();
    await page.getByRole('heading', { level: 1, name: driver?.component.name ?? 'a driver' }).waitFor();
    expect(page.url()).toContain(`/parts/${driver?.component.id}`);
    await page.goBack();
    await page
      .getByRole('region', { name: 'Needs doing' })
      .getByRole('link', { name: todo?.text ?? 'something to do' })
      .click();
    await page.waitForURL((url) => url.pathname + url.search === todo?.path);
  });

  it('puts what needs doing before the picture on a phone', async () => {
    const page = await browser.at('owner', '/', { viewport: PHONE });
    const { share } = wordsOf(await answerOf<MonthReview>(page, '/reports/month'));
    expect(await sentenceOf(page)).toContain(share);
    const needs = await page.getByRole('region', { name: 'Needs doing' }).boundingBox();
    const picture = await page.getByRole('region', { name: /^Came back within/ }).boundingBox();
    expect(needs?.y).toBeLessThan(picture?.y ?? 0);
    await page.getByRole('navigation', { name: 'At hand' }).getByRole('link', { name: 'Parts' }).click();
    await page.getByRole('heading', { level: 1, name: 'Parts' }).waitFor();
  });
});

const repairsIn = ({ rows, month }: MonthReview) =>
  new Intl.DateTimeFormat('en-US', { month: 'long', year: 'numeric', timeZone: 'UTC' }).format(
    new Date(`${rows.find((row) => row.month === month)?.month}-15T00:00:00Z`),
  );
