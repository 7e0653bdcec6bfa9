import { vi } from 'vitest';

export interface Asked {
  method: string;
  path: string;
  body: any;
}

type Answer = { status?: number; body: unknown };
type Handler = (asked: Asked) => Answer | unknown;

/** Answers `METHOD /path` from a table and remembers what it was asked. */
export function fakeServer(handlers: Record<string, Handler>) {
  const asked: Asked[] = [];
  vi.stubGlobal('fetch', async (path: string, init: RequestInit = {}) => {
    const request = {
      method: init.method ?? 'GET',
      path,
      body: init.body === undefined ? undefined : JSON.parse(String(init.body)),
    };
    asked.push(request);
    const handler = handlers[`${request.method} ${path}`];
    if (!handler) return respond(404, refusal('NOT_FOUND', `Nothing answers ${request.method} ${path}.`));
    const answer = handler(request) as Answer;
    const isWhole = answer !== null && typeof answer === 'object' && 'body' in answer;
    return isWhole ? respond(answer.status ?? 200, answer.body) : respond(200, answer);
  });
  return { asked, of: (path: string) => asked.filter((entry) => entry.path === path) };
}

export const refusal = (code: string, message: string, fields?: { path: string; message: string }[]) => ({
  error: { code, message, ...(fields ? { fields } : {}) },
});

const respond = (status: number, body: unknown) =>
  new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } });
