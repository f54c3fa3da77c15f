import { dayNumber } from '../../../analytics/records/day-number';
import type {
  RecordComponent,
  RecordLine,
  RecordRepair,
  RecordUnit,
} from '../../../analytics/records/record-types';

/** Rows with every field set to "the record does not say", to write only what a case is about. */
export function unitRow(row: Partial<RecordUnit> = {}): RecordUnit {
  return { id: 'u', modelId: 'm', inRegister: false, inServiceDay: null, knownFromDay: null, ...row };
}

export function repairRow(id: string, closedOn: string, row: Partial<RecordRepair> = {}): RecordRepair {
  return {
    id,
    unitId: 'u',
    modelId: 'm',
    ticketType: 'repair',
    openedDay: null,
    readyDay: null,
    closedDay: dayNumber(closedOn),
    meterHours: null,
    ...row,
  };
}

export function partLine(repairId: string, componentId: string, row: Partial<RecordLine> = {}): RecordLine {
  return {
    repairId,
    kind: 'part',
    componentId,
    partId: null,
    reason: 'failed',
    workDone: null,
    quantity: 1,
    ...row,
  };
}

export function workLine(
  repairId: string,
  componentId: string,
  workDone: RecordLine['workDone'],
): RecordLine {
  return partLine(repairId, componentId, { kind: 'work', reason: null, workDone });
}

export function componentRow(
  id: string,
  systemId: string | null,
  row: Partial<RecordComponent> = {},
): RecordComponent {
  return { id, name: id, systemId, ...row };
}
