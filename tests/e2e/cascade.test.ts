import { describe, expect, it } from 'vitest';
import type { Finding, FindingWhole } from '../../shared/findings';
import { answerOf, expectNoBarriers, goTo, PHONE, plain, useBrowser } from './browser';

const browser = useBrowser();

type Findings = { data: Finding[] };

describe('cascades', () => {
  it('go from the list to one pair whose counts are the API’s and add up', async () => {
    const page = await browser.at('owner', '/cascades');
    const cascades = (await answerOf<Findings>(page, '/cascades')).data.filter(
      ({ kind }) => kind === 'cascade',
    );
    const pairs = page.getByRole('region', { name: 'The pairs, one a model' });
    expect(await pairs.getByRole('row').count()).toBe(cascades.length + 1);
    const [pair] = [...cascades].sort((a, b) => b.episodesWithBoth - a.episodesWithBoth);
    if (!pair) throw new Error('the demo shop has no cascade');

    await pairs.locator(`a[href="/cascades/${pair.id}"]`).click();
    await page.getByRole('heading', { level: 1, name: `${pair.causal} → ${pair.resultant}` }).waitFor();
    const whole = await answerOf<FindingWhole>(page, `/cascades/${pair.id}`);
    const sentence = plain(await page.locator('[data-finding]').innerText());
    expect(sentence).toContain(`${pair.leftIn.returns} of ${pair.leftIn.of} were back`);
    expect(sentence).toContain(`${pair.replaced.returns} of ${pair.replaced.of}`);

    const strength = plain(await page.getByRole('region', { name: 'How strong is it' }).innerText());
    const unjudged = pair.resultantFailures - pair.leftIn.of - pair.replaced.of;
    expect(unjudged).toBeGreaterThanOrEqual(0);
    if (unjudged > 0) expect(strength).toContain(`${unjudged} too young to judge`);
    expect(pair.resultantNearCausal + pair.resultantAlone).toBe(pair.resultantFailures);
    expect(strength).toContain(
      `${pair.resultantNearCausal} in a trouble with both, ${pair.resultantAlone} without`,
    );

    const counts = await Promise.all(
      (['for', 'against', 'neutral'] as const).map(async (speaks) => {
        const title = { for: 'speak for it', against: 'speak against it', neutral: 'say neither' }[speaks];
        const cases = whole.cases.filter((episode) => episode.speaks === speaks);
        if (cases.length === 0 && speaks === 'neutral') return 0;
        const heading = await page.getByRole('heading', { level: 2, name: title }).innerText();
        expect(heading).toContain(`(${cases.length})`);
        return cases.length;
      }),
    );
    expect(counts.reduce((sum, count) => sum + count, 0)).toBe(whole.cases.length);
  });

  it('open the repairs that speak for a pair and those against it', async () => {
    const page = await browser.at('tech', '/cascades');
    const { data } = await answerOf<Findings>(page, '/cascades');
    const [pair] = data.filter(({ kind }) => kind === 'cascade').sort((a, b) => b.leftIn.of - a.leftIn.of);
    const whole = await answerOf<FindingWhole>(page, `/cascades/${pair?.id}`);
    for (const [speaks, title] of [
      ['for', /^Troubles that speak for it/],
      ['against', /^Troubles that speak against it/],
    ] as const) {
      await goTo(page, `/cascades/${pair?.id}`);
      const link = page
        .getByRole('region', { name: title })
        .getByRole('row')
        .nth(1)
        .locator('a[href^="/repairs/"]');
      const number = await link.first().innerText();
      const named = whole.cases
        .filter((episode) => episode.speaks === speaks)
        .flatMap(({ visits }) => visits.map(({ repair }) => repair.name));
      expect(named).toContain(number);
      await link.first().click();
      await page.getByRole('heading', { level: 1, name: `Repair ${number}` }).waitFor();
    }
  });

  it('keep the list of unproven pairs short until it is asked for', async () => {
    const page = await browser.at('owner', '/cascades', { viewport: PHONE });
    const cases = page.getByRole('region', { name: /^Case files/ });
    expect(await cases.getByRole('listitem').count()).toBeLessThanOrEqual(10);
    await cases.getByRole('button', { name: /^Show all/ }).click();
    expect(await cases.getByRole('listitem').count()).toBeGreaterThan(10);
    await expectNoBarriers(page);
  });
});
