import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { expect, test } from 'vitest';
import type { PartLife } from '../../shared/parts';
import { CLUTCH, modelListed, observations, partLife, R42 } from './part-life';
import { renderPage, type Asked } from './render-page';

const PATH = `/parts/${CLUTCH.id}`;
const list = (data: unknown[]) => ({ data, nextCursor: null });
const answers = (life: PartLife | ((asked: Asked) => PartLife)) => ({
  'GET /part-life': life,
  'GET /models': list([modelListed()]),
  'GET /families': list([{ id: 'family-1', name: '38-series clutch', models: [] }]),
});

async function sentence(life: PartLife, path = PATH) {
  await renderPage(path, answers(life));
  return document.querySelector('[data-finding]')?.textContent?.replaceAll('\u202f', ' ');
}

test('a part that wears out says by when, with limits, and what the newer number does', async () => {
  const said = await sentence(
    partLife(observations(60), {
      comparison: {
        older: { id: 'a', name: '38-2114' },
        newer: { id: 'b', name: '38-2290' },
        ratio: 0.44,
        interval: { lower: 0.27, upper: 0.71 },
        pValue: 0.001,
        method: '',
      },
    }),
  );
  expect(said).toMatch(
    /^All part numbers together: it wears out: one in ten is gone by \d+ h \(\d+–\d+\), half by \d+ h \(\d+–\d+\)/,
  );
  expect(said).toContain('38-2290, fails less than half as often at the same age (0.27–0.71 times)');
});

test('limits that span one make no claim about the newer number', async () => {
  const said = await sentence(
    partLife(observations(60), {
      comparison: {
        older: { id: 'a', name: '38-2114' },
        newer: { id: 'b', name: '38-2290' },
        ratio: 0.8,
        interval: { lower: 0.5, upper: 1.3 },
        pValue: 0.4,
        method: '',
      },
    }),
  );
  expect(said).toContain('cannot be told yet (0.50–1.30 times as often)');
});

test('no failure gives a bound, never an estimate', async () => {
  const rows = observations(84).map(({ time }) => ({ time, failed: false }));
  const said = await sentence(partLife(rows));
  // Of n seen running that long none failed: 0.05^(1/n) of all reach it at least.
  const last = partLife(rows)
    .atRiskAt.filter(({ time, atRisk }) => time > 0 && atRisk >= 5)
    .at(-1);
  expect(said).toContain(
    `None of 84 failed: at least half last beyond ${last?.time.toLocaleString('en-US')} h, from the ${last?.atRisk}`,
  );
  expect(said).not.toContain('gone by');
});

test('one age of failure is too few, and no line is drawn', async () => {
  const rows = observations(30).map(({ time }, index) => ({
    time: index === 3 ? 90 : time,
    failed: index === 3,
  }));
  const said = await sentence(partLife(rows, { pattern: 'too_few' }));
  expect(said).toContain('1 of 30 failed, at 90 h: too few to say how long it lasts');
  expect(screen.queryByText('Does the line fit?')).toBeNull();
});

test('failures that cannot tell say so, and few of them are called rough', async () => {
  const rows = observations(12).map((row, index) => ({ ...row, failed: index % 3 === 1 }));
  const said = await sentence(partLife(rows, { pattern: 'cannot_tell' }));
  expect(said).toContain(
    'Only 4 of 12 failed, which gives no more than a rough figure: 4 failures cannot tell whether',
  );
});

test('scope, machines that came in and the bound on reasons stand before the figure', async () => {
  const said = await sentence(
    partLife(observations(60), {
      scope: { model: R42, family: null },
      amongThoseThatCameIn: true,
      unknown: 7,
    }),
    `${PATH}?model=${R42.id}&reasons=allFailed`,
  );
  expect(said).toMatch(
    /^On the Tarnlow R42, among machines that came in, if every replacement without a reason was a failure: it/,
  );
});

test('nothing followed offers to take the original parts in', async () => {
  await renderPage(PATH, answers(partLife([], { assumedOriginal: 12, unknown: 3 })));
  const link = screen.getByRole('link', { name: 'take these for the original parts' });
  expect(link.getAttribute('href')).toContain('original=true');
});

test('every choice is in the address and in the question', async () => {
  const { asked } = await renderPage(
    `${PATH}?model=${R42.id}`,
    answers(partLife(observations(60), { unknown: 38 })),
  );
  const last = () => asked.filter(({ path }) => path === '/part-life').at(-1)?.search;
  expect(last()?.get('modelId')).toBe(R42.id);
  expect(last()?.get('component')).toBe(CLUTCH.id);
  fireEvent.click(screen.getByRole('radio', { name: 'months' }));
  await waitFor(() => expect(last()?.get('clock')).toBe('days'));
  fireEvent.click(await screen.findByRole('radio', { name: 'as failed' }));
  await waitFor(() => expect(last()?.get('reasons')).toBe('allFailed'));
  expect(last()?.get('modelId')).toBe(R42.id);
});

test('on the calendar clock days are written as months', async () => {
  const said = await sentence(partLife(observations(60, 2.6, 900), { clock: 'days' }));
  expect(said).toMatch(/half by \d+ months \(\d+–\d+\)/);
});

test('numbers apart ask for each number, and label it', async () => {
  const number = (name: string, failures: number): PartLife['numbers'][number] => ({
    part: { id: name, name },
    maker: 'Tarnlow',
    supersededBy: null,
    fitmentNote: name === '38-2290' ? 'Set the gap at three slots.' : null,
    firstFittedOn: '2023-03-02',
    lives: 40,
    failures,
    weibull: { kind: 'notEstimable', reason: 'noFailures' },
  });
  const life = partLife(observations(60), { numbers: [number('38-2114', 30), number('38-2290', 5)] });
  const { asked } = await renderPage(`${PATH}?numbers=apart`, answers(life));
  const numbers = asked.flatMap(({ path, search }) =>
    path === '/part-life' ? [search.get('partNumbers')] : [],
  );
  expect(numbers).toEqual([null, '38-2114', '38-2290']);
  expect(screen.getByText('Set the gap at three slots.')).toBeTruthy();
});

test('the same figures stand in a table', async () => {
  const life = partLife();
  await renderPage(PATH, answers(life));
  const [asTable] = await screen.findAllByRole('button', { name: 'as a table' });
  if (asTable) fireEvent.click(asTable);
  const table = screen.getByRole('table', { name: 'Share still running, by hours since fitted' });
  expect(within(table).getAllByRole('row')).toHaveLength(life.kaplanMeier.length + 1);
});

test('whoever may not read figures is shown the repairs instead', async () => {
  const { asked, router } = await renderPage(
    PATH,
    { 'GET /repairs': list([]), 'GET /models': list([]) },
    { role: 'counter' },
  );
  expect(`${router.state.location.pathname}${router.state.location.search}`).toBe(
    `/repairs?componentId=${CLUTCH.id}`,
  );
  expect(asked.map(({ path }) => path)).not.toContain('/part-life');
});
