import type { Member } from '../../../shared/administration';
import { ROLES } from '../../../shared/roles';
import type { MemberRow } from './queries';

export function presentMember(row: MemberRow): Member {
  const role = ROLES.find((name) => name === row.role);
  if (!role) throw new Error(`an unknown role is stored: ${row.role}`);
  return {
    id: row.id,
    userId: row.userId,
    email: row.email,
    displayName: row.displayName,
    role,
    isDisabled: row.disabledAt !== null,
    hasPassword: row.hasPassword,
    technicianId: row.technicianId,
  };
}
