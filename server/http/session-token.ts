import type { Response } from 'express';
import jwt from 'jsonwebtoken';
import type { Config } from '../config';

export const SESSION_COOKIE = 'witness_session';
export const IDLE_HOURS = 8;
export const LONGEST_DAYS = 14;

/** A token that says which session row it stands for, and nothing else. */
export function signSessionToken(sessionId: string, secret: string): string {
  return jwt.sign({ sid: sessionId }, secret, { algorithm: 'HS256', expiresIn: `${LONGEST_DAYS}d` });
}

/** The session that a token names, or undefined where it is forged, expired or of another kind. */
export function readSessionToken(token: string, secret: string): string | undefined {
  try {
    const payload = jwt.verify(token, secret, { algorithms: ['HS256'] });
    const sid: unknown = typeof payload === 'string' ? undefined : payload['sid'];
    return typeof sid === 'string' ? sid : undefined;
  } catch {
    return undefined;
  }
}

export function setSessionCookie(response: Response, token: string, config: Config): void {
  response.cookie(SESSION_COOKIE, token, {
    httpOnly: true,
    sameSite: 'lax',
    secure: config.isHttps,
    path: '/',
    maxAge: IDLE_HOURS * 3_600_000,
  });
}

export function clearSessionCookie(response: Response, config: Config): void {
  response.clearCookie(SESSION_COOKIE, {
    httpOnly: true,
    sameSite: 'lax',
    secure: config.isHttps,
    path: '/',
  });
}
