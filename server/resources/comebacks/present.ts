import type { Comeback } from '../../../shared/comebacks';
import type { ComebackRow } from './queries';

export function presentComeback(row: ComebackRow, seesPeople: boolean): Comeback {
  return {
    ...row,
    technicians: seesPeople ? row.technicians : [],
    decidedBy: seesPeople ? row.decidedBy : null,
    decidedAt: row.decidedAt === null ? null : new Date(row.decidedAt).toISOString(),
  };
}
