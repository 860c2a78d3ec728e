import { type OperationId } from '@lib/contracts';
import { type api } from './api';

/** Every item of a keyset list, page by page, as a browser scrolling to the end would get it. */
export async function walk(
  client: ReturnType<typeof api>,
  id: OperationId,
  query: Record<string, unknown> = {},
  params: Record<string, string> = {},
): Promise<Record<string, unknown>[]> {
  const items: Record<string, unknown>[] = [];
  let cursor: string | undefined;
  do {
    const { status, body } = await client.call(id, {
      params,
      query: { ...query, ...(cursor ? { cursor } : {}) },
    });
    if (status !== 200) throw new Error(`${id} answered ${status}: ${JSON.stringify(body)}`);
    items.push(...(body.items as Record<string, unknown>[]));
    cursor = (body.next as string | null) ?? undefined;
  } while (cursor);
  return items;
}
