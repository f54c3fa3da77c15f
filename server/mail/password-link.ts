import { createHmac } from 'node:crypto';
import type { Deps } from '../deps';

type LinkDeps = { config: Pick<Deps['config'], 'publicUrl'>; sessionSecret: string };

const PLACE = /\{password-link:([0-9a-f-]{36})\}/g;

/**
 * The secret of a password link, made from its row's id and the service's own secret. The database holds only its hash,
 * and a stored mail only the place where the link goes: who reads either can set nobody's password.
 */
export function passwordTokenOf(tokenId: string, sessionSecret: string): string {
  return createHmac('sha256', sessionSecret).update(`password-link:${tokenId}`).digest('base64url');
}

/** Where the link of a token goes in a stored text. */
export const placeForLink = (tokenId: string): string => `{password-link:${tokenId}}`;

export function withLinks(text: string, { config, sessionSecret }: LinkDeps): string {
  return text.replace(
    PLACE,
    (_place, tokenId: string) =>
      `${config.publicUrl}/set-password?token=${passwordTokenOf(tokenId, sessionSecret)}`,
  );
}

export const withoutLinks = (text: string): string => text.replace(PLACE, '(the link is in the mail alone)');
