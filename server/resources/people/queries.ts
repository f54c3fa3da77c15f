import { and, asc, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '../../db/client';
import { memberships, technicians, users } from '../../db/schema/index';

const columns = {
  id: memberships.id,
  userId: memberships.userId,
  email: users.email,
  displayName: users.displayName,
  role: memberships.role,
  disabledAt: memberships.disabledAt,
  hasPassword: sql<boolean>`${users.passwordHash} IS NOT NULL`,
  technicianId: technicians.id,
};

const selectMembers = (tx: Transaction) =>
  tx
    .select(columns)
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .leftJoin(technicians, eq(technicians.userId, memberships.userId));

export type MemberRow = Awaited<ReturnType<typeof listMembers>>[number];

export const listMembers = (tx: Transaction, { after, limit }: { after?: string; limit: number }) =>
  selectMembers(tx)
    .where(after === undefined ? undefined : gt(users.email, after))
    .orderBy(asc(users.email))
    .limit(limit);

export async function findMember(tx: Transaction, id: string): Promise<MemberRow | undefined> {
  const [row] = await selectMembers(tx).where(eq(memberships.id, id));
  return row;
}

/** The owners who can sign in, locked, so that two of them cannot step down at one moment. */
export async function lockOwners(tx: Transaction): Promise<string[]> {
  const rows = await tx
    .select({ id: memberships.id, hasPassword: columns.hasPassword })
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .where(and(eq(memberships.role, 'owner'), isNull(memberships.disabledAt)))
    .orderBy(asc(memberships.id))
    .for('update', { of: memberships });
  return rows.filter((row) => row.hasPassword).map(({ id }) => id);
}
