import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { expect, test } from 'vitest';
import { layOutFlows } from '../../src/components/charts/flow-layout';
import { evenly } from '../../src/features/cascades/episode-rows';
import { strengthOf } from '../../src/features/cascades/finding-words';
import { findingWhole, summary } from './finding';
import { FINDING_ID, modelListed, R42 } from './part-life';
import { renderPage } from './render-page';

const list = (data: unknown[]) => ({ data, nextCursor: null });
const models = list([modelListed()]);
const said = () => document.querySelector('[data-finding]')?.textContent?.replaceAll('\u202f', ' ');

/** The list carries no cases. */
const listed = (given = {}) => {
  const { cases: _, ...finding } = findingWhole(given);
  return finding;
};

test('the strongest pair is the sentence, and its ribbon is a link with its counts', async () => {
  await renderPage('/cascades', {
    'GET /cascades': list([listed()]),
    'GET /cascades/summary': summary(),
    'GET /models': models,
  });
  expect(said()).toBe(
    'On the Tarnlow R42 a failing PTO clutch takes the PTO switch with it: replaced alone, 31 of 44 were back within 90 days; replaced with the PTO clutch, 1 of 38.',
  );
  const ribbon = await screen.findByRole('link', { name: /^PTO clutch → PTO switch: .*31 of 44 \(56–82/ });
  expect(ribbon.getAttribute('href')).toBe(`/cascades/${FINDING_ID}`);
  expect(screen.getByText(/153 pairs examined, 1 held/)).toBeTruthy();
});

test('no pair says how many were examined; what fails together stands apart', async () => {
  await renderPage(`/cascades?model=${R42.id}`, {
    'GET /cascades': list([listed({ kind: 'together', causal: 'Battery', resultant: 'Starter' })]),
    'GET /cascades/summary': summary({
      caseFiles: [
        {
          model: R42,
          first: { id: 'x', name: 'Belt' },
          second: { id: 'y', name: 'Idler pulley' },
          times: 4,
          repairs: [{ id: 'r', name: 'R-1' }],
        },
      ],
    }),
    'GET /models': models,
  });
  expect(said()).toContain(
    'No part is shown to take another with it on the Tarnlow R42, though 1 pair fail together',
  );
  expect(screen.getByRole('heading', { name: 'Pairs that only fail together (1)' })).toBeTruthy();
  expect(screen.getByText(/4 times here; not proof/)).toBeTruthy();
  expect(screen.queryByRole('heading', { name: 'What takes what with it' })).toBeNull();
});

test('before the first analysis nothing is claimed', async () => {
  await renderPage('/cascades', {
    'GET /cascades': list([]),
    'GET /cascades/summary': summary({ asOf: null, pairsExamined: 0, models: 0 }),
    'GET /models': models,
  });
  expect(said()).toContain('have not been read together yet');
});

test('the counts of one pair reconcile', async () => {
  await renderPage(`/cascades/${FINDING_ID}`, { [`GET /cascades/${FINDING_ID}`]: findingWhole() });
  const table = screen.getByRole('table', { name: 'How strong is it' });
  const row = (name: RegExp) =>
    within(table).getByRole('row', { name }).textContent?.replaceAll('\u202f', ' ');
  // 44 + 38 + 4 = 86
  expect(row(/86 PTO switch replacements, trouble back/)).toContain('4 too young to judge');
  expect(row(/near one of/)).toContain('73 in a trouble with both, 13 without (85 % near)');
  // 36 + 4 + 21 = 61 = 30 + 27 + 4
  expect(row(/replaced first/)).toContain('PTO switch 36, PTO clutch 4, both at once 21');
  expect(row(/what ended it/)).toContain('PTO clutch alone 30, both at once 27, PTO switch alone 4');
  expect(row(/Spent/)).toContain('over 36 repairs of 18 troubles');
  expect(row(/What is shown/)).toContain('replaced before');
});

test('one line is one machine; a part of them is picked evenly, and all are to be had', async () => {
  await renderPage(`/cascades/${FINDING_ID}`, { [`GET /cascades/${FINDING_ID}`]: findingWhole() });
  const chart = await screen.findByRole('group', { name: 'The troubles behind it' });
  const lines = () =>
    within(screen.getByRole('group', { name: 'The troubles behind it' })).getAllByRole('link');
  expect(within(chart).getAllByRole('link')).toHaveLength(14);
  expect(screen.getByText('14 of 19 shown, evenly picked')).toBeTruthy();
  fireEvent.click(screen.getByRole('button', { name: 'show all' }));
  await waitFor(() => expect(lines()).toHaveLength(19));
});

test('troubles against the finding are listed with those for it', async () => {
  await renderPage(`/cascades/${FINDING_ID}`, { [`GET /cascades/${FINDING_ID}`]: findingWhole() });
  const against = screen.getByRole('table', { name: 'Troubles that speak against it' });
  expect(within(against).getByRole('link', { name: 'TN-10090' })).toBeTruthy();
  expect(screen.getByRole('heading', { name: 'Troubles that speak for it (18)' })).toBeTruthy();
});

test('ribbons fill their bars and never overlap at them', () => {
  const flows = [
    { from: 'clutch', to: 'switch', size: 47 },
    { from: 'clutch', to: 'fuse', size: 23 },
    { from: 'regulator', to: 'battery', size: 34 },
    { from: 'regulator', to: 'fuse', size: 5 },
  ];
  const { left, right, ribbons, height } = layOutFlows(flows);
  for (const [nodes, end, at] of [
    [left, 'from', 'fromY'],
    [right, 'to', 'toY'],
  ] as const) {
    for (const node of nodes) {
      const own = ribbons.filter(({ flow }) => flow[end] === node.name).sort((a, b) => a[at] - b[at]);
      let next = node.y;
      for (const ribbon of own) {
        expect(ribbon[at]).toBeCloseTo(next);
        next += ribbon.thickness;
      }
      expect(next).toBeCloseTo(node.y + node.height);
      expect(next).toBeLessThanOrEqual(height + 1e-9);
    }
  }
});

test('strength grows with the difference and is bounded', () => {
  const weak = listed({ leftIn: { returns: 5, of: 40, interval: { lower: 0, upper: 1 } } });
  expect(strengthOf([weak])).toBeLessThan(strengthOf([listed()]));
  expect(strengthOf([listed({ replaced: { returns: 0, of: 4000, interval: { lower: 0, upper: 1 } } })])).toBe(
    1,
  );
});

test('an even pick keeps the first and the last', () => {
  expect(evenly([1, 2, 3, 4, 5, 6, 7], 3)).toEqual([1, 4, 7]);
  expect(evenly([1, 2], 3)).toEqual([1, 2]);
});
