import pg from 'pg';
import { ROLE_NAMES, type Role } from '../../shared/roles';

export const DEMO_PASSWORD = 'witness-mark-demo';
export const DEMO_SHOP = 'Millrace Small Engine';

export const DEMO_PEOPLE: readonly { email: string; name: string; role: Role }[] = [
  { email: 'owner@millrace.example', name: 'Ines Aldane', role: 'owner' },
  { email: 'manager@millrace.example', name: 'Tom Varley', role: 'service_manager' },
  { email: 'tech@millrace.example', name: 'Dale Kettering', role: 'technician' },
  { email: 'books@millrace.example', name: 'Noor Halvard', role: 'accountant' },
  { email: 'counter@millrace.example', name: 'Wren Castell', role: 'counter' },
];

/** Who can sign in to the demo shop; none where it is not there. */
export async function demoSignIns(databaseUrl: string): Promise<{ email: string; role: string }[]> {
  return withMigrator(databaseUrl, async (client) => {
    const { rows } = await client.query('SELECT FROM shops WHERE name = $1', [DEMO_SHOP]);
    return rows.length === 0 ? [] : DEMO_PEOPLE.map(({ email, role }) => ({ email, role: ROLE_NAMES[role] }));
  });
}

export async function withMigrator<Result>(
  databaseUrl: string,
  work: (client: pg.Client) => Promise<Result>,
): Promise<Result> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}
