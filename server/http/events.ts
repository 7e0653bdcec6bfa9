import type { Response } from 'express';

const HEARTBEAT_MS = 15_000;

/** A stream of server-sent events of one kind. */
export interface EventStream<Value> {
  send(event: string, id: string, value: Value): void;
  end(): void;
  /** Called once, whoever closes the stream. */
  onClose(listener: () => void): void;
}

export function openEventStream<Value>(res: Response, check: (value: Value) => Value): EventStream<Value> {
  res.status(200);
  res.setHeader('Content-Type', 'text/event-stream; charset=utf-8');
  res.setHeader('Cache-Control', 'no-store, no-transform');
  // Asks a proxy in between not to collect the events.
  res.setHeader('X-Accel-Buffering', 'no');
  res.flushHeaders();
  res.write('retry: 2000\n\n');
  // A comment now and then keeps proxies from closing a silent connection and shows a dead one.
  const heartbeat = setInterval(() => res.write(': still here\n\n'), HEARTBEAT_MS);
  heartbeat.unref();
  res.on('close', () => clearInterval(heartbeat));
  return {
    send(event, id, value) {
      if (res.writableEnded) return;
      res.write(`event: ${event}\nid: ${id}\ndata: ${JSON.stringify(check(value))}\n\n`);
    },
    end() {
      if (!res.writableEnded) res.end();
    },
    onClose(listener) {
      res.on('close', listener);
    },
  };
}
