import { QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import { createMemoryRouter, RouterProvider } from 'react-router';
import { vi } from 'vitest';
import type { Role } from '../../shared/roles';
import type { Session } from '../../shared/session';
import { queryClient } from '../../src/lib/query-client';
import { routes } from '../../src/router';

export type Asked = { method: string; path: string; search: URLSearchParams; body: unknown };
/** `GET /reports/month` → the answer, or a function of what was asked; `Problem` for an error. */
export type Answers = Record<string, unknown>;

export class Problem {
  constructor(
    readonly status: number,
    readonly body: Record<string, unknown>,
  ) {}
}

export function sessionOf(role: Role, shop: Partial<Session['shop']> = {}): Session {
  const id = '00000000-0000-4000-8000-000000000001';
  return {
    user: { id, email: 'ines@millrace.example', displayName: 'Ines Aldane' },
    shop: {
      id,
      name: 'Millrace Small Engine',
      role,
      timeZone: 'America/Chicago',
      locale: 'en-US',
      currency: 'USD',
      windowDays: 90,
      today: '2026-07-24',
      ...shop,
    },
    shops: [{ id, name: 'Millrace Small Engine', role }],
  };
}

/** Stands in for the network: each request is answered from `answers`, and what was asked is kept. */
export function answerWith(answers: Answers): Asked[] {
  const asked: Asked[] = [];
  vi.stubGlobal(
    'fetch',
    vi.fn(async (input: string, init: RequestInit = {}) => {
      const url = new URL(input, 'http://localhost');
      const method = init.method ?? 'GET';
      const path = url.pathname.replace('/api/v1', '');
      const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : init.body;
      const question = { method, path, search: url.searchParams, body };
      asked.push(question);
      const key = `${method} ${path}`;
      const found = answers[key];
      const answer: unknown = typeof found === 'function' ? found(question) : found;
      if (answer instanceof Problem) return respond(answer.status, answer.body);
      if (!(key in answers)) return respond(404, { title: 'Not found', detail: `no answer for ${key}` });
      return answer === undefined ? new Response(null, { status: 204 }) : respond(200, answer);
    }),
  );
  return asked;
}

function respond(status: number, body: unknown): Response {
  return new Response(JSON.stringify(body), { status, headers: { 'Content-Type': 'application/json' } });
}

type Options = { role?: Role; /** Off for pages that end in an error. */ awaitHeading?: boolean };

/** Opens a page of the real routes with a signed-in person, and waits for its title. */
export async function renderPage(path: string, answers: Answers, options: Options = {}) {
  const { role = 'owner', awaitHeading = true } = options;
  queryClient.clear();
  const asked = answerWith({ 'GET /session': sessionOf(role), ...answers });
  const router = createMemoryRouter(routes, { initialEntries: [path] });
  render(
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  if (awaitHeading) await screen.findByRole('heading', { level: 1 });
  return { asked, router };
}
