import type { Caller } from './test-server';

export interface ReadEvent {
  event: string;
  id: string;
  data: any;
}

/** Follows a stream of server-sent events until it ends, or until `enough` says so. */
export async function readEvents(
  caller: Caller,
  path: string,
  { enough = (_events: ReadEvent[]): boolean => false, headers = {} as Record<string, string> } = {},
): Promise<ReadEvent[]> {
  const response = await caller.raw(path, { headers });
  if (response.status !== 200) throw new Error(`no stream: ${response.status}`);
  const events: ReadEvent[] = [];
  let text = '';
  const decoder = new TextDecoder();
  for await (const chunk of response.body!) {
    text += decoder.decode(chunk as Uint8Array, { stream: true });
    const blocks = text.split('\n\n');
    text = blocks.pop()!;
    events.push(...blocks.flatMap(parseBlock));
    // Leaving the loop closes the connection.
    if (enough(events)) break;
  }
  return events;
}

function parseBlock(block: string): ReadEvent[] {
  const lines = block.split('\n').map((line) => line.split(/: (.*)/s));
  const value = (name: string) => lines.find(([key]) => key === name)?.[1];
  const data = value('data');
  return data === undefined
    ? []
    : [{ event: value('event') ?? 'message', id: value('id') ?? '', data: JSON.parse(data) }];
}
