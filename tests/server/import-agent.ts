import type { Agent } from 'supertest';
import { setTimeout as wait } from 'node:timers/promises';
import { importState, type ImportState } from '../../shared/imports';

type Sending = { kind?: string; mapping?: unknown; dryRun?: boolean; fileName?: string };

/** Sends a file as a browser would. */
export function sendFile(agent: Agent, content: string | Buffer, sending: Sending = {}) {
  const { kind = 'repairs', mapping, dryRun, fileName = 'repairs.csv' } = sending;
  const form = agent.post('/api/v1/imports').field('kind', kind);
  if (mapping !== undefined) form.field('mapping', JSON.stringify(mapping));
  if (dryRun !== undefined) form.field('dryRun', String(dryRun));
  return form.attach('file', Buffer.from(content), fileName);
}

/** Sends a file and waits until the import is over. */
export async function bringFile(
  agent: Agent,
  content: string | Buffer,
  sending: Sending = {},
): Promise<ImportState> {
  const answer = await sendFile(agent, content, sending);
  if (answer.status !== 202)
    throw new Error(`the import answered ${answer.status}: ${JSON.stringify(answer.body)}`);
  return overOf(agent, importState.parse(answer.body).id);
}

export async function overOf(agent: Agent, id: string): Promise<ImportState> {
  for (;;) {
    const state = importState.parse((await agent.get(`/api/v1/imports/${id}`)).body);
    if (state.status !== 'queued' && state.status !== 'running') return state;
    await wait(20);
  }
}

export const csv = (...rows: readonly (readonly string[])[]): string =>
  rows
    .map(
      (row) =>
        `${row.map((cell) => (/[",\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell)).join(',')}\r\n`,
    )
    .join('');
