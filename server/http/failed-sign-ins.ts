import type { Request, Response } from 'express';
import { ipKeyGenerator } from 'express-rate-limit';
import { AppError } from './errors';

const WINDOW_MS = 15 * 60_000;
const PER_PERSON = 10;
const PER_ADDRESS = 100;
const PRUNE_ABOVE = 10_000;

/**
 * Counts failed sign-ins and nothing else, so that no number of people who know their password is held up: ten in a
 * quarter of an hour for one address and e-mail, a hundred for one address.
 */
export function createFailedSignInLimit(now: () => Date) {
  const perPerson = createFailureCount(PER_PERSON, now);
  const perAddress = createFailureCount(PER_ADDRESS, now);
  const keysOf = (request: Request, email: string) => {
    const address = ipKeyGenerator(request.ip ?? '');
    return { address, person: `${address}|${email}` };
  };
  return {
    /** @throws tooMany; asked before a password is compared, and again before the answer tells whether it was right. */
    requireRoom(request: Request, response: Response, email: string): void {
      const { address, person } = keysOf(request, email);
      const waitMs = Math.max(perPerson.waitMs(person), perAddress.waitMs(address));
      if (waitMs === 0) return;
      response.set('Retry-After', String(Math.ceil(waitMs / 1000)));
      throw new AppError('tooMany', 'Too many failed sign-ins. Try again in a quarter of an hour.');
    },
    note(request: Request, email: string): void {
      const { address, person } = keysOf(request, email);
      perPerson.note(person);
      perAddress.note(address);
    },
  };
}

/** Failures by key in a window that starts with the first of them. */
function createFailureCount(limit: number, now: () => Date) {
  const counts = new Map<string, { failures: number; endsAt: number }>();
  return {
    waitMs(key: string): number {
      const found = counts.get(key);
      return found && found.failures >= limit ? Math.max(0, found.endsAt - now().getTime()) : 0;
    },
    note(key: string): void {
      const time = now().getTime();
      if (counts.size > PRUNE_ABOVE)
        for (const [old, { endsAt }] of counts) if (endsAt <= time) counts.delete(old);
      const found = counts.get(key);
      if (found && found.endsAt > time) found.failures += 1;
      else counts.set(key, { failures: 1, endsAt: time + WINDOW_MS });
    },
  };
}
