import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { namesIn } from '../../server/db/technician-names';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let shop: TestShop;
let owner: Awaited<ReturnType<TestShop['as']>>;
const API = '/api/v1';

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
  owner = await shop.as('owner');
});
afterAll(() => house.close());

const one = async (text: string, values: unknown[]) =>
  (await house.migrator.query<{ id: string }>(text, values)).rows[0]?.id ?? '';

/** A spelling that means a technician of its own, as an import leaves it. */
async function spelling(text: string) {
  const technicianId = await one(
    'INSERT INTO technicians (shop_id, display_name) VALUES ($1, $2) RETURNING id',
    [shop.id, text],
  );
  const id = await one(
    'INSERT INTO technician_names (shop_id, spelling, spelling_key, technician_id) VALUES ($1, $2, lower($2), $3) RETURNING id',
    [shop.id, text, technicianId],
  );
  return { id, technicianId };
}

async function repair(number: string, text: string, technicianIds: readonly string[], lineText?: string) {
  const id = await one(
    `INSERT INTO repairs (shop_id, number, number_key, closed_on, technician_text) VALUES ($1, $2, $2, '2026-03-01', $3) RETURNING id`,
    [shop.id, number, text],
  );
  if (lineText)
    await one(
      `INSERT INTO repair_lines (shop_id, repair_id, position, kind, technician_text) VALUES ($1, $2, 1, 'labor', $3) RETURNING id`,
      [shop.id, id, lineText],
    );
  for (const technicianId of technicianIds)
    await one('INSERT INTO repair_technicians (shop_id, repair_id, technician_id) VALUES ($1, $2, $3)', [
      shop.id,
      id,
      technicianId,
    ]);
  return id;
}

const techniciansOf = async (repairId: string) =>
  (
    await house.migrator.query<{ id: string }>(
      'SELECT technician_id AS id FROM repair_technicians WHERE repair_id = $1 ORDER BY 1',
      [repairId],
    )
  ).rows.map(({ id }) => id);

describe('names in a record', () => {
  it.each([
    ['DK', ['DK']],
    [' DK / rm ', ['DK', 'rm']],
    ['D. Kern & R.  Mott', ['D. Kern', 'R. Mott']],
    ['Dana Kern and Dana kern', ['Dana Kern']],
    ['Kern, Dana; Mott, Ray', ['Kern, Dana', 'Mott, Ray']],
    ['', []],
    [null, []],
  ])('are found in %j', (text, names) => {
    expect(namesIn(text)).toEqual(names);
  });
});

describe('spellings', () => {
  it('mean whom the owner says, and every repair that bears them follows', async () => {
    const short = await spelling('DK');
    const long = await spelling('Dana Kern');
    const other = await spelling('RM');
    const alone = await repair('1', 'dk', [short.technicianId]);
    const both = await repair('2', 'DK/RM', [short.technicianId, other.technicianId]);
    const line = await repair('3', 'RM', [short.technicianId, other.technicianId], 'DK');
    const already = await repair('4', 'Dana Kern', [long.technicianId]);
    const { userId } = shop.person('technician');
    await owner.patch(`${API}/technicians/${short.technicianId}`).send({ userId }).expect(200);

    const answer = await owner
      .put(`${API}/technician-names/${short.id}`)
      .send({ technicianId: long.technicianId });
    expect(answer.body).toMatchObject({
      id: long.technicianId,
      userId,
      spellings: [
        { spelling: 'Dana Kern', isConfirmed: false, repairs: 1 },
        { spelling: 'DK', isConfirmed: true, repairs: 3 },
      ],
    });
    expect(await techniciansOf(alone)).toEqual([long.technicianId]);
    expect(await techniciansOf(both)).toEqual([long.technicianId, other.technicianId].sort());
    expect(await techniciansOf(line)).toEqual([long.technicianId, other.technicianId].sort());
    expect(await techniciansOf(already)).toEqual([long.technicianId]);
    // Whom no spelling and no repair names any more is gone.
    const { body } = await owner.get(`${API}/technicians`);
    expect(body.data.map(({ displayName }: { displayName: string }) => displayName)).toEqual([
      'Dana Kern',
      'RM',
    ]);
  });

  it('and technicians of another shop are not there', async () => {
    const { id, technicianId } = await spelling('Own');
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.put(`${API}/technician-names/${id}`).send({ technicianId }).expect(404);
    await stranger.patch(`${API}/technicians/${technicianId}`).send({ displayName: 'x' }).expect(404);
    expect((await stranger.get(`${API}/technicians`)).body).toEqual({ data: [], nextCursor: null });
  });
});

describe('a technician', () => {
  it('is one person who signs in, or none', async () => {
    const first = await spelling('First');
    const second = await spelling('Second');
    const { userId } = shop.person('counter');
    const link = (id: string, body: object) => owner.patch(`${API}/technicians/${id}`).send(body);
    expect((await link(first.technicianId, { userId, leftOn: '2026-05-31' })).body).toMatchObject({
      userId,
      leftOn: '2026-05-31',
    });
    expect((await link(second.technicianId, { userId })).body.userId).toBe(userId);
    const { body } = await owner.get(`${API}/technicians`);
    const linked = body.data.filter((row: { userId: string | null }) => row.userId === userId);
    expect(linked.map(({ id }: { id: string }) => id)).toEqual([second.technicianId]);
    const people = (await owner.get(`${API}/users`)).body.data;
    expect(people.find((row: { userId: string }) => row.userId === userId).technicianId).toBe(
      second.technicianId,
    );
    expect((await link(second.technicianId, { userId: null })).body.userId).toBeNull();
    const other = await house.makeShop({ roles: ['owner'] });
    await link(first.technicianId, { userId: other.person('owner').userId }).expect(400);
  });
});
