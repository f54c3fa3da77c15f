import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { monthReview } from './month-review';
import { Problem, renderPage } from './render-page';

describe('This month', () => {
  it('leads with the sentence, then what needs doing, the picture and what drives it', async () => {
    await renderPage('/', { 'GET /reports/month': monthReview() });
    expect(screen.getByText(/of the 212 repairs done in April came back/)).toBeTruthy();
    const needs = screen.getByRole('region', { name: 'Needs doing' });
    expect(within(needs).getByRole('link', { name: '3 comebacks to look at' }).getAttribute('href')).toBe(
      '/comebacks?status=suggested',
    );
    expect(screen.getByText(/by the door this month: 12, from March–May work/)).toBeTruthy();
    expect(screen.getByText(/Not a booked figure/)).toBeTruthy();
    const drivers = screen.getByRole('table', { name: /What drives it/ });
    const heads = within(drivers)
      .getAllByRole('columnheader')
      .map((cell) => cell.textContent);
    expect(heads.indexOf('Came back')).toBeLessThan(heads.indexOf('After allowing for few jobs'));
    expect(within(drivers).getByRole('img', { name: '19\u202f% (12–29\u202f%)' })).toBeTruthy();
  });

  it('gives the picture’s figures as a table, with maturing months named so', async () => {
    await renderPage('/', { 'GET /reports/month': monthReview() });
    fireEvent.click(screen.getByRole('button', { name: 'as a table' }));
    const table = screen.getByRole('table', { name: /Came back within 90 days/ });
    const june = within(table).getByRole('row', { name: /June 2026/ });
    expect(june.textContent).toContain('days not over; 8.3\u202f% expected');
    const april = within(table).getByRole('row', { name: /April 2026/ });
    expect(april.textContent).toContain('over the limit');
  });

  it('asks for the month in the address', async () => {
    const { asked } = await renderPage('/?month=2026-03', {
      'GET /reports/month': monthReview({ month: '2026-03' }),
    });
    const question = asked.find(({ path }) => path === '/reports/month');
    expect(question?.search.get('month')).toBe('2026-03');
    expect(screen.getByText(/done in March came back/)).toBeTruthy();
  });

  it('shows an empty shop nothing but where to begin', async () => {
    await renderPage('/', {
      'GET /reports/month': monthReview({ repairsInAll: 0, month: null, rows: [], drivers: [], todos: [] }),
    });
    expect(screen.getByRole('link', { name: 'Bring in a file' })).toBeTruthy();
    expect(screen.queryByRole('table')).toBeNull();
  });

  it('shows a technician among few a page of its own in place of the shop’s rate', async () => {
    await renderPage(
      '/',
      { 'GET /reports/month': new Problem(403, { title: 'Not allowed', detail: 'See your own.' }) },
      { role: 'technician' },
    );
    expect(screen.getByRole('heading', { level: 1, name: 'This month' })).toBeTruthy();
    expect(document.title).toBe('This month · Witness Mark');
    const own = screen.getByRole('link', { name: 'What came back of your own repairs' });
    expect(own.getAttribute('href')).toBe('/comebacks');
    expect(screen.queryByRole('alert')).toBeNull();
  });

  it('says what went wrong with its number, and tries again', async () => {
    let tries = 0;
    await renderPage(
      '/',
      {
        'GET /reports/month': () => {
          tries += 1;
          return tries <= 1
            ? new Problem(400, { title: 'Not valid', detail: 'Write a month as 2026-04.' })
            : monthReview();
        },
      },
      { awaitHeading: false },
    );
    expect((await screen.findByRole('alert')).textContent).toContain('Write a month as 2026-04.');
    fireEvent.click(screen.getByRole('button', { name: 'Try again' }));
    await waitFor(() => expect(screen.getByText(/of the 212 repairs/)).toBeTruthy());
  });
});
