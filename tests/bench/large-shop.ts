import type pg from 'pg';

const id = (kind: string, number: string) => `md5('${kind}' || (${number}))::uuid`;

/**
 * A shop of 100,000 repairs and 300,000 lines on 25,000 machines of 120 models over ten years, one machine in four of
 * which came back once; its figures as an analysis would leave them. Made in the database, the same every time.
 */
export async function makeLargeShop(migrator: pg.ClientBase, shopId: string): Promise<void> {
  for (const statement of statementsFor(`'${shopId}'::uuid`)) await migrator.query(statement);
}

const statementsFor = (shop: string) => [
  `INSERT INTO technicians (shop_id, id, display_name) SELECT ${shop}, ${id('technician', 'n')}, 'Technician ' || n
    FROM generate_series(0, 7) n`,
  `INSERT INTO customers (shop_id, id, ref, ref_key, name, phone)
    SELECT ${shop}, ${id('customer', 'n')}, 'C' || n, 'c' || n, 'Customer ' || n, '555-01' || lpad(n::text, 4, '0')
    FROM generate_series(0, 7999) n`,
  `INSERT INTO models (shop_id, id, maker, maker_key, model, model_key)
    SELECT ${shop}, ${id('model', 'n')}, 'Maker ' || n % 12, 'maker ' || n % 12, 'M-' || n, 'm-' || n
    FROM generate_series(0, 119) n`,
  `INSERT INTO components (shop_id, id, name, name_key, system)
    SELECT ${shop}, ${id('component', 'n')}, 'Component ' || n, 'component ' || n, 'System ' || n % 9
    FROM generate_series(0, 149) n`,
  `INSERT INTO parts (shop_id, id, maker, maker_key, number, number_key, description, component_id)
    SELECT ${shop}, ${id('part', 'n')}, 'Maker ' || n % 12, 'maker ' || n % 12, 'P-' || n, 'p-' || n, 'Part ' || n,
      ${id('component', 'n % 150')} FROM generate_series(0, 2999) n`,
  `INSERT INTO units (shop_id, id, identity, serial, serial_key, maker_key, model_id, customer_id, in_service_on,
      is_registered)
    SELECT ${shop}, ${id('unit', 'n')}, 'serial', 'SN' || n, 'sn' || n, 'maker ' || n % 120 % 12,
      ${id('model', 'n % 120')}, ${id('customer', 'n % 8000')}, DATE '2015-05-01' + n * 7919 % 2900, n % 2 = 0
    FROM generate_series(0, 24999) n`,
  `INSERT INTO repairs (shop_id, id, number, number_key, opened_on, closed_on, unit_id, model_id, customer_id,
      serial_text, meter_hours, complaint, cause, correction, technician_text, pay_type, labor_hours,
      labor_amount_cents)
    SELECT ${shop}, ${id('repair', 'n')}, 'R-' || n, 'r-' || n, work_on - 2, work_on, ${id('unit', 'u')},
      ${id('model', 'u % 120')}, ${id('customer', 'u % 8000')}, 'SN' || u, 50 + v * 120 + u % 90,
      'Deck will not engage, belt squeals; case ' || n % 997, 'Worn part found on inspection',
      'Replaced the part, tested under load', 'Technician ' || n % 8, 'customer', 1.2, 11400
    FROM generate_series(0, 24999) u, generate_series(0, 3) v, LATERAL (SELECT u * 4 + v AS n,
      DATE '2016-03-01' + u * 7919 % 2900 + v * 200 + CASE WHEN v = 3 AND u % 4 = 0 THEN u % 60 - 190 ELSE 0 END AS work_on
    ) visit`,
  `INSERT INTO repair_technicians (shop_id, repair_id, technician_id)
    SELECT ${shop}, ${id('repair', 'n')}, ${id('technician', 'n % 8')} FROM generate_series(0, 99999) n`,
  `INSERT INTO repair_lines (shop_id, id, repair_id, position, kind, part_id, part_number_text, description,
      component_id, component_origin, reason, reason_origin, quantity, amount_cents, cost_cents)
    SELECT ${shop}, ${id('line', 'l')}, ${id('repair', 'l / 3')}, l % 3, 'part', ${id('part', 'p')}, 'P-' || p,
      'Part ' || p, ${id('component', 'p % 150')}, 'file',
      (ARRAY['failed', 'maintenance', 'unknown', 'failed', 'damage'])[1 + p % 5], 'file', 1, 2000 + p, 900 + p
    FROM generate_series(0, 299999) l, LATERAL (SELECT l * 31 % 3000 AS p) part`,
  `INSERT INTO repair_facts (shop_id, repair_id, left_out, trouble_component_ids, systems)
    SELECT ${shop}, ${id('repair', 'n')}, CASE WHEN n % 7 = 6 THEN 'maintenance_only' END,
      ARRAY[${id('component', 'n * 93 % 150')}], ARRAY['system ' || n * 93 % 150 % 9] FROM generate_series(0, 99999) n`,
  `INSERT INTO comebacks (shop_id, return_repair_id, first_repair_id, episode_repair_id, days, link, suggested_reason,
      evidence, component_id)
    SELECT ${shop}, ${id('repair', 'u * 4 + 3')}, ${id('repair', 'u * 4 + 2')}, ${id('repair', 'u * 4 + 2')}, 8 + u % 60,
      'same_component', CASE WHEN u % 16 = 0 THEN 'unrelated' ELSE 'part_failed_again' END, 'The same component.',
      ${id('component', '(u * 4 + 2) * 93 % 150')}
    FROM generate_series(0, 24999, 4) u`,
  `INSERT INTO part_lives (shop_id, unit_id, model_id, component_id, part_id, origin, start_repair_id, start_on, end_on,
      outcome, exit_days, exit_hours)
    SELECT x.shop_id, r.unit_id, r.model_id, x.component_id, x.part_id, 'fitted', r.id, r.work_on, r.work_on + 400,
      CASE WHEN x.position = 0 THEN 'failed' ELSE 'censored' END, 1 + x.amount_cents % 900, 1 + x.amount_cents % 300
    FROM repair_lines x JOIN repairs r ON r.shop_id = x.shop_id AND r.id = x.repair_id WHERE x.shop_id = ${shop}`,
  `INSERT INTO analysis_runs (shop_id, state, as_of, started_at, finished_at)
    VALUES (${shop}, 'ready', '2026-09-01', now(), now())`,
  'VACUUM ANALYZE',
];
