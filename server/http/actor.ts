import type { Grantee, KeyScope, Role } from '../../shared/roles';
import { forbidden } from './errors';

/** Who is asking, in which shop. Put on the request by the authentication middleware. */
export type Actor = UserActor | KeyActor;
export type UserActor = { kind: 'user'; userId: string; sessionId: string; shopId: string; role: Role };
export type KeyActor = { kind: 'key'; keyId: string; shopId: string; scopes: readonly KeyScope[] };

export function granteesOf(actor: Actor): readonly Grantee[] {
  return actor.kind === 'user' ? [actor.role] : actor.scopes.map((scope): Grantee => `key:${scope}`);
}

/** @throws forbidden for a program. */
export function requireUser(actor: Actor): UserActor {
  if (actor.kind !== 'user') throw forbidden('This is for people who are signed in.');
  return actor;
}
