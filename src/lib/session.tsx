import { queryOptions, useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { mayRead, mayWrite, permissionOf, type Area, type Role } from '../../shared/roles';
import type { Session } from '../../shared/session';
import { apiGet } from './api';
import { formatsFor, type Formats } from './format';

export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: ({ signal }) => apiGet<Session>('/session', {}, signal),
  staleTime: 5 * 60_000,
});

/** Who is signed in, and in which shop. Only for what stands inside the shell. */
export function useSession(): Session {
  return useSuspenseQuery(sessionQuery).data;
}

export type Verb = 'read' | 'write';

export function can(role: Role, area: Area, verb: Verb = 'read'): boolean {
  return verb === 'write' ? mayWrite(role, area) : mayRead(role, area);
}

/** What the person's role may do; `own` is reading narrowed to one's own repairs. */
export function useCan() {
  const { role } = useSession().shop;
  return useMemo(
    () => ({
      can: (area: Area, verb: Verb = 'read') => can(role, area, verb),
      isOwnOnly: (area: Area) => permissionOf(role, area) === 'own',
    }),
    [role],
  );
}

/** Figures, money and dates the way that the shop writes them. */
export function useFormats(): Formats {
  const { locale, currency, timeZone } = useSession().shop;
  return useMemo(() => formatsFor({ locale, currency, timeZone }), [locale, currency, timeZone]);
}
