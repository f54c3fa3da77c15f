import { describe, expect, it } from 'vitest';
import type { PartLife } from '../../shared/parts';
import { answerOf, plain, useBrowser } from './browser';

const browser = useBrowser();

describe('one part', () => {
  it('is found among the parts and says how long it lasts: sentence, curve, numbers, by the API', async () => {
    const page = await browser.at('tech', '/parts');
    const row = page
      .getByRole('region', { name: 'Components' })
      .getByRole('row')
      .filter({ hasText: 'PTO clutch' });
    await row.getByRole('link', { name: 'PTO clutch', exact: true }).click();
    await page.getByRole('heading', { level: 1, name: 'PTO clutch' }).waitFor();
    const id = new URL(page.url()).pathname.split('/').at(-1);
    const life = await answerOf<PartLife>(page, `/part-life?component=${id}`);

    const sentence = plain(await page.locator('[data-finding]').innerText());
    expect(sentence).toMatch(/wears out|fails young|at any age alike|cannot tell/);
    const tenth =
      life.weibull.kind === 'estimate' ? life.weibull.bLives.find(({ percent }) => percent === 10) : null;
    const months = 365.25 / 12;
    const age = Math.round((tenth?.estimate ?? 0) / (life.clock === 'hours' ? 1 : months));
    expect(sentence).toContain(`one in ten is gone by ${age} ${life.clock === 'hours' ? 'h' : 'months'}`);

    const picture = page.getByRole('region', { name: /^Share still running/ });
    await picture.getByRole('figure').locator('svg').first().waitFor();
    expect(plain(await picture.innerText())).toContain(`${life.failures} of ${life.lives} failed`);
    await picture.getByRole('button', { name: 'as a table' }).click();
    expect(await picture.getByRole('row').count()).toBe(life.kaplanMeier.length + 1);

    const numbers = page.getByRole('region', { name: 'Numbers' });
    for (const { part, lives, failures } of [...life.numbers]
      .sort((a, b) => b.failures - a.failures)
      .slice(0, 2)) {
      const cells = await numbers
        .getByRole('row')
        .filter({ has: page.getByRole('link', { name: part.name, exact: true }) })
        .getByRole('cell')
        .allInnerTexts();
      expect(cells.slice(0, 2)).toEqual([String(lives), String(failures)]);
    }
  });

  it('changes its clock in the address, and leads to the method behind it', async () => {
    const page = await browser.at('owner', '/parts');
    await page.getByRole('link', { name: 'PTO clutch', exact: true }).first().click();
    await page.getByRole('region', { name: 'Share still running, by hours since fitted' }).waitFor();
    await page.getByRole('group', { name: 'Age in' }).getByText('months').click();
    await page.waitForURL((url) => url.searchParams.get('clock') === 'days');
    const picture = page.getByRole('region', { name: 'Share still running, by months since fitted' });
    await picture.waitFor();
    await page.reload();
    await picture.getByRole('link', { name: 'how is this computed' }).click();
    const heading = page.getByRole('heading', { level: 3, name: 'Share still running' });
    await heading.waitFor();
    expect(new URL(page.url()).hash).toBe('#part-life');
    await expect
      .poll(() =>
        heading.evaluate((element) => Math.abs(element.getBoundingClientRect().top) < innerHeight / 2),
      )
      .toBe(true);
  });
});
