import type { Response } from 'express';
import jwt from 'jsonwebtoken';
import { z } from 'zod';
import type { Config } from '../config';
import type { Deps } from '../deps';

export const SESSION_COOKIE = 'witness_session';
export const IDLE_HOURS = 8;
export const LONGEST_DAYS = 14;

/** A token that says which session row it stands for and until when, and nothing else. */
export function signSessionToken(session: { id: string; expiresAt: Date }, secret: string): string {
  return jwt.sign({ sid: session.id, exp: Math.floor(session.expiresAt.getTime() / 1000) }, secret, {
    algorithm: 'HS256',
    noTimestamp: true,
  });
}

/** The session that a token names, or undefined where it is forged, expired or of another kind. */
export function readSessionToken(token: string, secret: string, now: Date): string | undefined {
  try {
    const payload = jwt.verify(token, secret, {
      algorithms: ['HS256'],
      clockTimestamp: Math.floor(now.getTime() / 1000),
    });
    const sid: unknown = typeof payload === 'string' ? undefined : payload['sid'];
    return z.uuid().safeParse(sid).data;
  } catch {
    return undefined;
  }
}

/** The cookie lives as long as an idle session may, and never past the session's own end. */
export function setSessionCookie(
  response: Response,
  session: { id: string; expiresAt: Date },
  deps: Pick<Deps, 'config' | 'sessionSecret' | 'now'>,
): void {
  response.cookie(SESSION_COOKIE, signSessionToken(session, deps.sessionSecret), {
    ...attributes(deps.config),
    maxAge: Math.min(IDLE_HOURS * 3_600_000, session.expiresAt.getTime() - deps.now().getTime()),
  });
}

export function clearSessionCookie(response: Response, config: Config): void {
  response.clearCookie(SESSION_COOKIE, attributes(config));
}

const attributes = (config: Config) =>
  ({ httpOnly: true, sameSite: 'lax', secure: config.isHttps, path: '/' }) as const;
