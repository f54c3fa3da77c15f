import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { expect, test } from 'vitest';
import { componentListed, modelListed, modelWhole, R42 } from './part-life';
import { rateRow } from './month-review';
import { Problem, renderPage } from './render-page';

const list = (data: unknown[]) => ({ data, nextCursor: null });
const said = () => document.querySelector('[data-finding]')?.textContent?.replaceAll('\u202f', ' ');
const rateOf = (key: string, label: string, count: number, size: number) =>
  rateRow('2026-04', count, size, {
    month: null,
    key,
    label,
    limits: { lower: 0, upper: 0.15 },
    shrunken: 0.09,
    shrunkenInterval: { lower: 0.05, upper: 0.14 },
  });

/** As with the keyboard: jsdom has no pointer to open a list with. */
async function choose(component: string, option: string) {
  fireEvent.keyDown(screen.getByRole('combobox', { name: `How ${component} is replaced` }), { key: 'Enter' });
  fireEvent.keyDown(await screen.findByRole('option', { name: option }), { key: 'Enter' });
}

test('models: the one that fails most, and only a share beyond chance is called out', async () => {
  await renderPage('/models', {
    'GET /models': list([
      modelListed(),
      modelListed({ id: 'z52', maker: 'Oakrill', model: 'Z52', failures: 20 }),
    ]),
    'GET /reports/comeback-rate': list([
      rateOf(R42.id, 'Tarnlow R42', 14, 200),
      rateOf('z52', 'Oakrill Z52', 30, 100),
    ]),
  });
  expect(said()).toContain(
    'The Tarnlow R42 has 143 of 163 failures on 61 machines, most of all its PTO clutch.',
  );
  expect(said()).toContain('Oakrill Z52 comes back more than chance explains: 30 of 100 repairs');
});

test('models: the counter sees no rates, and none are asked for', async () => {
  const { asked } = await renderPage(
    '/models',
    { 'GET /models': list([modelListed()]) },
    { role: 'counter' },
  );
  expect(asked.map(({ path }) => path)).not.toContain('/reports/comeback-rate');
  expect(screen.queryByRole('columnheader', { name: /Came back/ })).toBeNull();
});

test('a model says what fails, how long it lasts, and what to test besides', async () => {
  await renderPage(`/models/${R42.id}`, { [`GET /models/${R42.id}`]: modelWhole() });
  expect(said()).toContain('half are gone by 612 h (569–658). Its repairs come faster with age.');
  expect(screen.getByRole('link', { name: 'seen in 61 troubles here' })).toBeTruthy();
  const table = screen.getByRole('table', { name: 'How long they last' });
  expect(within(table).getByText('wears out')).toBeTruthy();
});

test('no mean time among machines that came in', async () => {
  const whole = modelWhole();
  await renderPage(`/models/${R42.id}`, {
    [`GET /models/${R42.id}`]: {
      ...whole,
      recurrence: { ...whole.recurrence, amongThoseThatCameIn: true, trend: 'no_trend' },
    },
  });
  expect(screen.getByText(/no mean time is given/)).toBeTruthy();
  expect(screen.queryByText(/of a machine on average/)).toBeNull();
});

test('parts: how it is replaced is changed where it stands, and sent', async () => {
  const { asked } = await renderPage('/parts', {
    'GET /components': list([componentListed('PTO clutch'), componentListed('Deck belt', { failures: 5 })]),
    'GET /models': list([]),
    'PATCH /components/pto-clutch': {},
  });
  expect(said()).toContain('The PTO clutch fails most: 60 of 65 failures.');
  expect(said()).toContain('known for 180 of 200 part lines (90 %)');
  await choose('PTO clutch', 'only changed when bad');
  await waitFor(() =>
    expect(asked.find(({ method }) => method === 'PATCH')?.body).toEqual({ kind: 'only_when_bad' }),
  );
});

test('parts: a change that is refused says why', async () => {
  await renderPage('/parts', {
    'GET /components': list([componentListed('PTO clutch')]),
    'GET /models': list([]),
    'PATCH /components/pto-clutch': new Problem(409, {
      title: 'Conflict',
      detail: 'Another change came first.',
    }),
  });
  await choose('PTO clutch', 'it depends');
  expect(await screen.findByText(/Another change came first/)).toBeTruthy();
});

test('parts: a technician reads what was said', async () => {
  await renderPage(
    '/parts',
    { 'GET /components': list([componentListed('Battery', { kind: 'depends' })]), 'GET /models': list([]) },
    { role: 'technician' },
  );
  expect(screen.queryByRole('combobox', { name: /is replaced/ })).toBeNull();
  expect(screen.getByRole('cell', { name: 'it depends' })).toBeTruthy();
});
