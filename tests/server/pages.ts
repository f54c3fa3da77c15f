import type { TestShop } from './house';

type TestAgent = Awaited<ReturnType<TestShop['as']>>;

/** Every row of a list, page by page to the end. */
export async function allPages(agent: TestAgent, path: string, limit: number): Promise<{ id: string }[]> {
  const seen: { id: string }[] = [];
  let cursor: string | null = null;
  do {
    const answer = await agent.get(path).query({ limit, ...(cursor ? { cursor } : {}) });
    if (answer.status !== 200) throw new Error(`${path} answered ${answer.status}`);
    seen.push(...answer.body.data);
    cursor = answer.body.nextCursor;
  } while (cursor);
  return seen;
}
