import type { Part } from './catalog';
import type { ComebackReason } from './comebacks';
import type { WorkDone } from './components';
import type { Unit } from './fleet';
import type { Location, Technician } from './people';
import type { Words } from './phrases';

export type LineReason = 'failed' | 'maintenance' | 'preventive' | 'damage' | 'upgrade';

export type PlannedLine =
  | { kind: 'part'; part: Part; reason: LineReason | ''; laborHours: number }
  | { kind: 'work'; component: string; work: WorkDone; laborHours: number }
  | { kind: 'note'; text: string; laborHours: 0 };

/** One stay of one machine in the shop, before it is written down as a repair. */
export interface Visit {
  unit: Unit;
  ticketType: 'repair' | 'setup';
  kind: 'trouble' | 'service' | 'setup';
  location: Location;
  openedDay: number;
  readyDay: number;
  closedDay: number;
  pickedUpDay: number;
  /** What the meter on the machine shows; null where there is none. */
  meterHours: number | null;
  technician: Technician;
  lines: PlannedLine[];
  laborOp: string;
  words: Words;
  payType: 'customer' | 'warranty' | 'shop';
  /** For which planted reason it came back, and from which visit. */
  comeback?: { reason: ComebackReason; first: Visit };
}
