import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import type { Role } from '../../shared/roles';
import { monthReview } from './month-review';
import { Problem, renderPage, sessionOf } from './render-page';

const SHOP = { 'GET /sessions': { data: [], nextCursor: null } };

describe('the shell', () => {
  it.each<[Role, string[]]>([
    [
      'owner',
      ['This month', 'Comebacks', 'Models', 'Parts', 'Cascades', 'Repairs', 'Imports', 'Help', 'Settings'],
    ],
    ['technician', ['This month', 'Comebacks', 'Models', 'Parts', 'Cascades', 'Repairs', 'Help', 'Settings']],
    ['counter', ['Models', 'Repairs', 'Help', 'Settings']],
  ])('shows the %s only what the role may read', async (role, expected) => {
    await renderPage('/settings/you', SHOP, { role });
    const rail = screen.getByRole('navigation', { name: 'Screens' });
    expect(
      within(rail)
        .getAllByRole('link')
        .map((link) => link.textContent),
    ).toEqual(expected);
  });

  it('offers the settings of the shop to the owner alone', async () => {
    await renderPage('/settings/you', SHOP, { role: 'service_manager' });
    const tabs = screen.getByRole('navigation', { name: 'Settings' });
    expect(
      within(tabs)
        .getAllByRole('link')
        .map((link) => link.textContent),
    ).toEqual(['You', 'Families']);
  });

  it('goes to the search box on a slash, unless something is being written', async () => {
    await renderPage('/', { 'GET /reports/month': monthReview() });
    const box = screen.getByRole('searchbox', { name: 'Find a repair' });
    fireEvent.keyDown(document.body, { key: '/' });
    expect(document.activeElement).toBe(box);
    fireEvent.keyDown(box, { key: 'Escape' });
    expect(document.activeElement).not.toBe(box);
    fireEvent.keyDown(document.body, { key: '/', ctrlKey: true });
    expect(document.activeElement).not.toBe(box);
  });

  it('sends who is not signed in to the door, and back afterwards', async () => {
    let isSignedIn = false;
    const { asked, router } = await renderPage('/?month=2026-03', {
      'GET /session': () => new Problem(401, { title: 'Not signed in', detail: 'Sign in first.' }),
      'POST /session': ({ body }: { body: { password: string } }) => {
        if (body.password !== 'right password') {
          return new Problem(401, {
            title: 'Not signed in',
            detail: 'This e-mail and password do not go together.',
          });
        }
        isSignedIn = true;
        return sessionOf('owner');
      },
      'GET /reports/month': () =>
        isSignedIn ? monthReview({ month: '2026-03' }) : new Problem(401, { title: 'x', detail: 'x' }),
    });
    expect(router.state.location.pathname).toBe('/sign-in');
    fireEvent.change(screen.getByLabelText('E-mail'), { target: { value: 'ines@millrace.example' } });
    fireEvent.change(screen.getByLabelText('Password'), { target: { value: 'wrong' } });
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect((await screen.findByRole('alert')).textContent).toBe(
      'This e-mail and password do not go together.',
    );
    fireEvent.change(screen.getByLabelText('Password'), { target: { value: 'right password' } });
    fireEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    await waitFor(() => expect(screen.getByText(/done in March came back/)).toBeTruthy());
    expect(router.state.location.search).toBe('?month=2026-03');
    expect(asked.filter(({ method }) => method === 'POST')).toHaveLength(2);
  });

  it('has a page for an address that leads nowhere', async () => {
    await renderPage('/nowhere', {});
    expect(screen.getByRole('heading', { name: 'No such page' })).toBeTruthy();
  });
});
