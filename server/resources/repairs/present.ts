import type { RepairLine, RepairListed, RepairWhole } from '../../../shared/repairs';
import type { findLinks, findVersions, RepairLineRow, RepairListedRow, RepairRow } from './queries';

export function presentListed(row: RepairListedRow, seesPeople: boolean): RepairListed {
  return { ...row, technicians: seesPeople ? row.technicians : [] };
}

type Around = {
  lines: readonly RepairLineRow[];
  links: Awaited<ReturnType<typeof findLinks>>;
  versions: Awaited<ReturnType<typeof findVersions>>;
  asOf: string | null;
};

export function presentRepair(
  row: RepairRow,
  { lines, links, versions, asOf }: Around,
  seesPeople: boolean,
): RepairWhole {
  const { serialText, unitRefText, engineMaker, engineModel, engineSerial, ...rest } = row;
  const linked = (direction: 'later' | 'earlier') =>
    links.filter((link) => link.direction === direction).map(({ direction: _, ...link }) => link);
  return {
    ...rest,
    machineText: row.unit ? null : wordsOf([serialText, unitRefText]),
    engine: wordsOf([engineMaker, engineModel, engineSerial]),
    customer: seesPeople ? row.customer : null,
    technicianText: seesPeople ? row.technicianText : null,
    technicians: seesPeople ? row.technicians : [],
    lines: lines.map((line): RepairLine => (seesPeople ? line : { ...line, technician: null })),
    cameBackAs: linked('later'),
    isComebackOf: linked('earlier')[0] ?? null,
    versions,
    asOf,
  };
}

function wordsOf(parts: readonly (string | null)[]): string | null {
  const text = parts.filter((part) => part).join(' ');
  return text === '' ? null : text;
}
