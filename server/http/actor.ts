import type { Grantee, KeyScope, Role } from '../../shared/roles';

/** Who is asking, in which shop. Put on the request by the authentication middleware. */
export type Actor =
  | { kind: 'user'; userId: string; sessionId: string; shopId: string; role: Role }
  | { kind: 'key'; keyId: string; shopId: string; scopes: readonly KeyScope[] };

export function granteesOf(actor: Actor): readonly Grantee[] {
  return actor.kind === 'user' ? [actor.role] : actor.scopes.map((scope): Grantee => `key:${scope}`);
}
