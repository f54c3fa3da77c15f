import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import type { Comeback } from '../../shared/comebacks';
import type { RepairWhole } from '../../shared/repairs';
import { Problem, renderPage, type Asked } from './render-page';

const id = (last: number) => `00000000-0000-4000-8000-00000000000${last}`;
const list = (data: unknown[], nextCursor: string | null = null) => ({ data, nextCursor });

const COMEBACK: Comeback = {
  id: id(1),
  repairNumber: 'R-200',
  firstRepairNumber: 'R-100',
  episodeRepairNumber: 'R-100',
  repairId: id(1),
  firstRepairId: id(2),
  episodeRepairId: id(2),
  unit: { id: id(3), name: 'TN-10559' },
  model: { id: id(4), name: 'Tarnlow R42' },
  component: { id: id(5), name: 'PTO switch' },
  technicians: [],
  firstWorkOn: '2026-05-01',
  returnedOn: '2026-05-28',
  days: 27,
  hours: 3.8,
  complaint: 'blades quit again',
  link: 'same_component',
  suggestedReason: 'part_failed_again',
  evidence: 'PTO switch replaced 1 May; replaced again 28 May',
  reason: null,
  isOurs: false,
  status: 'suggested',
  note: '',
  decidedBy: null,
  decidedAt: null,
  costCents: 13_500,
};
const RATES = [{ key: 'm', label: 'Tarnlow R42', count: 40, oursCount: 12, size: 400 }];
const comebackAnswers = {
  'GET /comebacks': list([COMEBACK]),
  'GET /reports/comeback-rate': list(RATES),
  [`PATCH /comebacks/${COMEBACK.id}`]: COMEBACK,
};
const patched = (asked: Asked[]) => asked.find(({ method }) => method === 'PATCH')?.body;
const finding = () => document.querySelector('[data-finding]')?.textContent;

describe('comebacks', () => {
  it('begin with those to look at, for who decides', async () => {
    const { asked } = await renderPage('/comebacks', comebackAnswers, { role: 'service_manager' });
    expect(finding()).toBe('1 comeback waits to be looked at. Of 40 that count, 12 are confirmed as ours.');
    const lists = asked.filter(({ path, search }) => path === '/comebacks' && !search.has('limit'));
    expect(lists.map(({ search }) => search.get('status'))).toEqual(['suggested']);
  });

  it('are confirmed with a reason, and asked whose doing where the reason does not say', async () => {
    const { asked } = await renderPage('/comebacks', comebackAnswers, { role: 'service_manager' });
    fireEvent.click(screen.getByRole('button', { name: 'Look at R-200' }));
    const dialog = within(screen.getByRole('dialog', { name: 'R-200, 27 days after R-100' }));
    fireEvent.click(dialog.getByRole('radio', { name: 'Yes, ours' }));
    fireEvent.change(dialog.getByLabelText('Note'), { target: { value: ' gap not set ' } });
    fireEvent.click(dialog.getByRole('button', { name: 'Confirm' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
    expect(patched(asked)).toEqual({
      status: 'confirmed',
      reason: 'part_failed_again',
      isOurs: true,
      note: 'gap not set',
    });
  });

  it('are put aside without a reason, and taken back again', async () => {
    const decided = { ...COMEBACK, status: 'confirmed', reason: 'cause_missed', isOurs: true };
    const { asked } = await renderPage(
      '/comebacks?status=all',
      { ...comebackAnswers, 'GET /comebacks': list([decided]) },
      { role: 'owner' },
    );
    expect(screen.getByText('confirmed, ours')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Change R-200' }));
    fireEvent.click(screen.getByRole('button', { name: 'Take it back: to look at' }));
    await waitFor(() => expect(patched(asked)).toEqual({ status: 'suggested', reason: null, isOurs: null }));
  });

  it('say in the dialog what the server refuses', async () => {
    await renderPage('/comebacks', {
      ...comebackAnswers,
      [`PATCH /comebacks/${COMEBACK.id}`]: new Problem(404, { title: 'Not found', detail: 'It is gone.' }),
    });
    fireEvent.click(screen.getByRole('button', { name: 'Look at R-200' }));
    fireEvent.click(screen.getByRole('button', { name: 'Confirm' }));
    expect((await screen.findByRole('alert')).textContent).toBe('It is gone.');
  });

  it('are help for the technician: no money, no rate, nothing to decide', async () => {
    const { asked } = await renderPage('/comebacks', comebackAnswers, { role: 'technician' });
    expect(finding()).toContain('1 of your repairs that came back');
    expect(screen.queryByText('$135')).toBeNull();
    expect(screen.queryByRole('button', { name: /Look at/ })).toBeNull();
    expect(asked.some(({ path }) => path === '/reports/comeback-rate')).toBe(false);
  });
});

const REPAIR: RepairWhole = {
  id: id(2),
  number: 'R-100',
  location: null,
  ticketType: 'repair',
  openedOn: '2026-04-29',
  readyOn: '2026-05-01',
  closedOn: '2026-05-01',
  pickedUpOn: null,
  workOn: '2026-05-01',
  unit: COMEBACK.unit,
  machineText: null,
  model: COMEBACK.model,
  customer: null,
  engine: null,
  meterHours: 417.3,
  meterFault: 'back',
  complaint: 'blades quit when hot',
  cause: 'switch burnt',
  correction: 'Replaced PTO switch.',
  notes: null,
  technicianText: null,
  technicians: [{ id: id(6), name: 'Dov Karr' }],
  payType: 'customer',
  laborOp: null,
  laborHours: 0.5,
  laborAmountCents: 5500,
  partsAmountCents: 2924,
  totalCents: 8424,
  lines: [
    {
      id: id(7),
      position: 1,
      kind: 'part',
      part: null,
      partNumber: 'TN-4471',
      description: 'SWITCH PTO',
      supplier: null,
      component: { id: id(5), name: 'PTO switch' },
      componentOrigin: 'catalogue',
      reason: 'failed',
      reasonOrigin: 'rule',
      workDone: null,
      quantity: 1,
      amountCents: 2924,
      costCents: null,
      laborOp: null,
      laborHours: null,
      laborAmountCents: null,
      technician: null,
      payType: null,
    },
  ],
  cameBackAs: [],
  isComebackOf: null,
  versions: [],
  asOf: '2026-07-24',
};
const openRepair = (change: Partial<RepairWhole> = {}) =>
  renderPage(`/repairs/${REPAIR.id}`, { [`GET /repairs/${REPAIR.id}`]: { ...REPAIR, ...change } });

describe('a repair', () => {
  it('is read as one story with its days', async () => {
    await openRepair();
    const story = screen.getByText('blades quit when hot').closest('p')?.textContent?.replace(/\s+/g, ' ');
    expect(story).toBe(
      'On Apr 29, 2026 the Tarnlow R42 TN-10559 came in at 417.3 h: blades quit when hot. What was found: switch burnt. By May 1, 2026 Dov Karr did this: Replaced PTO switch.',
    );
  });

  it('says of each line where it is known from, and of the reading why it is not used', async () => {
    await openRepair();
    expect(screen.getByText('from the parts list')).toBeTruthy();
    expect(screen.getByText('the shop’s rule')).toBeTruthy();
    expect(screen.getByText(/is not used: it is below an earlier reading/)).toBeTruthy();
    expect(screen.getByRole('complementary', { name: 'Before you work on it' })).toBeTruthy();
  });

  it.each<[string, Partial<RepairWhole>, string]>([
    ['held', { workOn: '2026-04-01' }, 'The work held'],
    ['is still young', { workOn: '2026-07-04' }, 'of its 90 days 20 days are over'],
    ['was never read with the others', { asOf: null }, 'have not been read together yet'],
    [
      'is known up to an earlier day',
      { workOn: '2026-04-01', asOf: '2026-05-01' },
      'of its 90 days 30 days are over',
    ],
    ['has no machine', { unit: null }, 'Its machine is not identified'],
    ['is no repair', { ticketType: 'setup' }, 'This was setup'],
    [
      'came back',
      {
        cameBackAs: [{ id: id(1), number: 'R-200', workOn: '2026-05-28', days: 27, evidence: 'the same' }],
      },
      'It came back after 27 days for the same trouble, as R-200.',
    ],
  ])('that %s begins with saying so', async (_, change, words) => {
    await openRepair(change);
    expect(finding()).toContain(words);
  });
});

describe('repairs', () => {
  it('are asked for as the address says, and say so when none is like that', async () => {
    const { asked } = await renderPage('/repairs?q=fuse&cameBack=yes&from=2026-01-01', {
      'GET /repairs': list([]),
      'GET /models': list([]),
    });
    const { search } = asked.find(({ path }) => path === '/repairs') ?? { search: new URLSearchParams() };
    expect(Object.fromEntries(search)).toEqual({ q: 'fuse', cameBack: 'yes', from: '2026-01-01' });
    expect(screen.getByText('No repair is like that.')).toBeTruthy();
  });
});
