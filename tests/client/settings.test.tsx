import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import type { Member, ShopSettings, Technician } from '../../shared/administration';
import { centsOf } from '../../src/features/settings/money-input';
import { Problem, renderPage, type Asked } from './render-page';

const id = (last: number) => `00000000-0000-4000-8000-00000000000${last}`;
const list = (data: unknown[]) => ({ data, nextCursor: null });
const SHOP: ShopSettings = {
  id: id(1),
  name: 'Millrace Small Engine',
  timeZone: 'America/Chicago',
  locale: 'en-US',
  currency: 'USD',
  lengthUnit: 'in',
  temperatureUnit: 'degF',
  windowDays: 90,
  windowHours: null,
  doorRateCents: 9500,
};
const TECHNICIANS: Technician[] = [
  {
    id: id(5),
    displayName: 'Dov Karr',
    userId: null,
    leftOn: null,
    spellings: [
      { id: id(6), spelling: 'DK', isConfirmed: true, repairs: 812 },
      { id: id(7), spelling: 'Dov K.', isConfirmed: false, repairs: 31 },
    ],
  },
];
const PERSON: Member = {
  id: id(2),
  userId: id(3),
  email: 'dov@millrace.example',
  displayName: 'Dov Karr',
  role: 'technician',
  isDisabled: false,
  hasPassword: false,
  technicianId: null,
};

const sent = (asked: Asked[], method: string) => asked.filter((question) => question.method === method);
const write = (label: string | RegExp, value: string) =>
  fireEvent.change(screen.getByLabelText(label), { target: { value } });

describe('shop settings', () => {
  it('send what was changed, in the shape of the contract', async () => {
    const { asked } = await renderPage('/settings/shop', { 'GET /shop': SHOP, 'PATCH /shop': SHOP });
    await screen.findByLabelText('Name');
    write(/Days within which/, '60');
    write(/hours on the meter/, '25');
    write(/Door rate/, '101.5');
    fireEvent.click(screen.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(sent(asked, 'PATCH')).toHaveLength(1));
    expect(sent(asked, 'PATCH')[0]?.body).toEqual({ windowDays: 60, windowHours: 25, doorRateCents: 10_150 });
    expect(await screen.findByText(/The settings are saved/)).toBeTruthy();
  });

  it('are checked before they are sent', async () => {
    const { asked } = await renderPage('/settings/shop', { 'GET /shop': SHOP });
    await screen.findByLabelText('Name');
    write('Currency', 'dollars');
    write(/Days within which/, '');
    write(/Door rate/, '1000000');
    fireEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(await screen.findByText('Three capital letters, such as USD.')).toBeTruthy();
    expect(screen.getByText('Write a number.')).toBeTruthy();
    expect(screen.getByText('This must be 1000000 or less.')).toBeTruthy();
    expect(screen.getByLabelText('Currency').getAttribute('aria-invalid')).toBe('true');
    expect(sent(asked, 'PATCH')).toHaveLength(0);
  });

  it('show what the server refuses beside its field', async () => {
    await renderPage('/settings/shop', {
      'GET /shop': SHOP,
      'PATCH /shop': new Problem(400, {
        title: 'Not valid',
        detail: 'The body cannot be used as sent.',
        errors: [{ path: '/timeZone', message: 'There is no such zone.' }],
      }),
    });
    await screen.findByLabelText('Name');
    write('Time zone', 'Millrace/Yard');
    fireEvent.click(screen.getByRole('button', { name: 'Save' }));
    const message = await screen.findByText('There is no such zone.');
    expect(screen.getByLabelText('Time zone').getAttribute('aria-describedby')).toContain(message.id);
  });

  it.each([
    ['95', 9500],
    ['95.5', 9550],
    ['95,50', 9550],
    [' 0.07 ', 7],
  ])('read %j as money', (text, cents) => expect(centsOf(text)).toBe(cents));

  it.each(['', 'ninety', '-5', '1.234'])('do not read %j as money', (text) =>
    expect(centsOf(text)).toBeNaN(),
  );
});

describe('people', () => {
  const answers = { 'GET /users': list([PERSON]), 'GET /technicians': list(TECHNICIANS) };

  it('are invited with a role', async () => {
    const { asked } = await renderPage('/settings/people', { ...answers, 'POST /users': PERSON });
    fireEvent.click(await screen.findByRole('button', { name: 'Invite someone' }));
    const dialog = within(screen.getByRole('dialog', { name: 'Invite someone' }));
    fireEvent.click(dialog.getByRole('button', { name: 'Send the invitation' }));
    expect(await dialog.findByText('This is not an e-mail address.')).toBeTruthy();
    expect(dialog.getByText('This cannot be empty.')).toBeTruthy();
    fireEvent.change(dialog.getByLabelText('Name'), { target: { value: 'Bo Lind' } });
    fireEvent.change(dialog.getByLabelText('E-mail'), { target: { value: 'bo@millrace.example' } });
    fireEvent.click(dialog.getByRole('button', { name: 'Send the invitation' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
    expect(sent(asked, 'POST')[0]?.body).toEqual({
      displayName: 'Bo Lind',
      email: 'bo@millrace.example',
      role: 'technician',
    });
  });

  it('can be shut out', async () => {
    const { asked } = await renderPage('/settings/people', {
      ...answers,
      [`PATCH /users/${PERSON.id}`]: PERSON,
    });
    expect(await screen.findByText('invited, no password yet')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Shut out Dov Karr' }));
    await waitFor(() => expect(sent(asked, 'PATCH')[0]?.body).toEqual({ isDisabled: true }));
  });
});

describe('keys', () => {
  it('are shown once, and are gone with the dialog', async () => {
    const key = {
      id: id(4),
      name: 'Tickets',
      hint: '9f3a',
      scopes: ['read'],
      createdAt: '2026-07-01T00:00:00Z',
    };
    await renderPage('/settings/keys', {
      'GET /keys': list([]),
      'POST /keys': { ...key, lastUsedAt: null, isRevoked: false, key: 'wm_secret' },
    });
    fireEvent.click(await screen.findByRole('button', { name: 'Make a key' }));
    write('Name', 'Tickets');
    fireEvent.click(screen.getByRole('button', { name: 'Make the key' }));
    expect(await screen.findByText('wm_secret')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Close' }));
    await waitFor(() => expect(screen.queryByText('wm_secret')).toBeNull());
  });
});

describe('technician names', () => {
  it('are confirmed as the person they stand for', async () => {
    const { asked } = await renderPage('/settings/technicians', {
      'GET /technicians': list(TECHNICIANS),
      [`PUT /technician-names/${id(7)}`]: TECHNICIANS[0],
    });
    fireEvent.click(await screen.findByRole('button', { name: 'Confirm “Dov K.”' }));
    await waitFor(() => expect(sent(asked, 'PUT')[0]?.body).toEqual({ technicianId: id(5) }));
    expect(screen.getByRole('cell', { name: '843' })).toBeTruthy();
  });
});

describe('families', () => {
  it('are made of models, and only read where the role may not change them', async () => {
    const family = { id: id(8), name: '42-inch deck', models: [{ id: id(9), name: 'Tarnlow R42' }] };
    const answers = {
      'GET /families': list([family]),
      'GET /models': list([{ id: id(9), maker: 'Tarnlow', model: 'R42' }]),
      'POST /families': family,
    };
    const { asked } = await renderPage('/settings/families', answers, { role: 'service_manager' });
    fireEvent.click(await screen.findByRole('button', { name: 'Make a family' }));
    write('Name', 'Deck');
    fireEvent.click(await screen.findByLabelText('Tarnlow R42'));
    fireEvent.click(screen.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(sent(asked, 'POST')[0]?.body).toEqual({ name: 'Deck', modelIds: [id(9)] }));
  });

  it('cannot be changed by a technician', async () => {
    await renderPage('/settings/families', { 'GET /families': list([]) }, { role: 'technician' });
    expect(await screen.findByText('No families yet.')).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Make a family' })).toBeNull();
  });
});

describe('setting a password', () => {
  it('sends the link’s token with a password that is long enough', async () => {
    const { asked, router } = await renderPage('/set-password?token=0123456789abcdef0123', {
      'POST /password/set': undefined,
    });
    write('New password', 'short');
    fireEvent.click(screen.getByRole('button', { name: 'Set the password' }));
    expect(await screen.findByText('Use at least 12 characters.')).toBeTruthy();
    write('New password', 'a long enough one');
    fireEvent.click(screen.getByRole('button', { name: 'Set the password' }));
    await waitFor(() => expect(sent(asked, 'POST')).toHaveLength(1));
    expect(sent(asked, 'POST')[0]?.body).toEqual({
      token: '0123456789abcdef0123',
      password: 'a long enough one',
    });
    await waitFor(() => expect(router.state.location.pathname).toBe('/sign-in'));
    expect(await screen.findByText(/Your password is set/)).toBeTruthy();
  });

  it('says that a link without its token is not whole', async () => {
    await renderPage('/set-password', {});
    expect(screen.getByText('This link is not whole.')).toBeTruthy();
  });

  it('asks for a link without saying who is known here', async () => {
    await renderPage('/forgot', { 'POST /password/forgot': undefined });
    write('E-mail', 'someone@millrace.example');
    fireEvent.click(screen.getByRole('button', { name: 'Send the link' }));
    expect((await screen.findByRole('status')).textContent).toContain(
      'If someone@millrace.example belongs to',
    );
  });
});
