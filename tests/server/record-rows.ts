import { randomUUID } from 'node:crypto';
import type pg from 'pg';
import { foldText } from '../../server/db/fold';

type Line = {
  kind?: string;
  componentId?: string | null;
  partId?: string | null;
  reason?: string;
  reasonOrigin?: string;
  workDone?: string | null;
  amountCents?: number | null;
  costCents?: number | null;
  laborHours?: number | null;
  laborAmountCents?: number | null;
  technicianText?: string | null;
  payType?: string | null;
};

type Repair = {
  number?: string;
  unitId?: string | null;
  modelId?: string | null;
  customerId?: string | null;
  openedOn?: string | null;
  closedOn: string;
  ticketType?: string;
  meterHours?: number | null;
  complaint?: string | null;
  payType?: string | null;
  laborHours?: number | null;
  laborAmountCents?: number | null;
  technicianText?: string | null;
  technicianIds?: readonly string[];
  lines?: readonly Line[];
  /** What the analysis makes of it: it can come back, with trouble of these components; else why not. */
  facts?: { leftOut?: string; trouble?: readonly string[] };
};

/** Rows of a shop's records, put straight into the tables; each call makes new ones and answers the id. */
export function recordRows(migrator: pg.Pool, shopId: string) {
  let serial = 0;
  const next = () => `${++serial}`;

  async function insert(table: string, row: Record<string, unknown>): Promise<void> {
    const columns = Object.keys(row);
    const places = columns.map((_, at) => `$${at + 1}`);
    await migrator.query(
      `INSERT INTO ${table} (${columns.join(', ')}) VALUES (${places.join(', ')})`,
      Object.values(row),
    );
  }

  async function insertWithId(table: string, row: Record<string, unknown>): Promise<string> {
    const id = randomUUID();
    await insert(table, { shop_id: shopId, id, ...row });
    return id;
  }

  const model = (name = `M-${next()}`, maker = 'Hollowell') =>
    insertWithId('models', {
      maker,
      maker_key: foldText(maker),
      model: name,
      model_key: foldText(name),
      product_type: 'lawn_tractor',
    });

  const unit = (modelId: string | null, extra: Record<string, unknown> = {}) => {
    const name = `SN-${next()}`;
    return insertWithId('units', {
      identity: 'serial',
      serial: name,
      serial_key: foldText(name),
      maker_key: 'hollowell',
      model_id: modelId,
      ...extra,
    });
  };

  const component = (name = `Component ${next()}`, extra: Record<string, unknown> = {}) =>
    insertWithId('components', { name, name_key: foldText(name), system: 'PTO drive', ...extra });

  const part = (componentId: string | null, number = `HW-${next()}`, extra: Record<string, unknown> = {}) =>
    insertWithId('parts', {
      maker: 'Hollowell',
      maker_key: 'hollowell',
      number,
      number_key: foldText(number),
      component_id: componentId,
      ...extra,
    });

  const customer = (name: string, phone: string) => {
    const ref = `C-${next()}`;
    return insertWithId('customers', { ref, ref_key: foldText(ref), name, phone });
  };

  const technician = (displayName: string, userId: string | null = null) =>
    insertWithId('technicians', { display_name: displayName, user_id: userId });

  async function repair(of: Repair): Promise<{ id: string; number: string }> {
    const number = of.number ?? `R-${next().padStart(5, '0')}`;
    const id = await insertWithId('repairs', {
      number,
      number_key: foldText(number),
      ticket_type: of.ticketType ?? 'repair',
      opened_on: of.openedOn === undefined ? of.closedOn : of.openedOn,
      closed_on: of.closedOn,
      unit_id: of.unitId ?? null,
      model_id: of.modelId ?? null,
      customer_id: of.customerId ?? null,
      meter_hours: of.meterHours ?? null,
      complaint: of.complaint ?? null,
      pay_type: of.payType ?? null,
      labor_hours: of.laborHours ?? null,
      labor_amount_cents: of.laborAmountCents ?? null,
      technician_text: of.technicianText ?? null,
    });
    for (const [position, line] of (of.lines ?? []).entries()) {
      await insertWithId('repair_lines', {
        repair_id: id,
        position,
        kind: line.kind ?? 'part',
        component_id: line.componentId ?? null,
        component_origin: line.componentId ? 'file' : 'unknown',
        part_id: line.partId ?? null,
        reason: line.reason ?? 'unknown',
        reason_origin: line.reasonOrigin ?? (line.reason ? 'file' : 'unknown'),
        work_done: line.workDone ?? null,
        amount_cents: line.amountCents ?? null,
        cost_cents: line.costCents ?? null,
        labor_hours: line.laborHours ?? null,
        labor_amount_cents: line.laborAmountCents ?? null,
        technician_text: line.technicianText ?? null,
        pay_type: line.payType ?? null,
      });
    }
    for (const technicianId of of.technicianIds ?? []) {
      await insert('repair_technicians', { shop_id: shopId, repair_id: id, technician_id: technicianId });
    }
    if (of.facts) {
      await insert('repair_facts', {
        shop_id: shopId,
        repair_id: id,
        left_out: of.facts.leftOut ?? null,
        trouble_component_ids: of.facts.trouble ?? [],
        systems: [],
      });
    }
    return { id, number };
  }

  const comeback = (returnId: string, firstId: string, extra: Record<string, unknown> = {}) =>
    insert('comebacks', {
      shop_id: shopId,
      return_repair_id: returnId,
      first_repair_id: firstId,
      episode_repair_id: firstId,
      days: 30,
      link: 'same_component',
      suggested_reason: 'cause_missed',
      evidence: 'The same component was replaced again.',
      ...extra,
    });

  /** A finished analysis, of which everything derived is as of. */
  const analyzed = (asOf: string, summary: unknown = {}) =>
    insertWithId('analysis_runs', {
      state: 'ready',
      as_of: asOf,
      finished_at: new Date(),
      summary: JSON.stringify(summary),
    });

  return {
    analyzed,
    insert,
    insertWithId,
    model,
    unit,
    component,
    part,
    customer,
    technician,
    repair,
    comeback,
  };
}

export type RecordRows = ReturnType<typeof recordRows>;
