import type { Response } from 'express';

/** Proxies close a connection that says nothing for long. */
const heartbeatEveryMs = 15_000;

export interface EventStream {
  send(name: string, data: unknown): void;
  end(): void;
}

/** Answers with server-sent events (WHATWG HTML, section 9.2). `onClose` runs when either side closes. */
export function openEventStream(response: Response, onClose: () => void): EventStream {
  response.status(200).set({
    'Content-Type': 'text/event-stream; charset=utf-8',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  response.flushHeaders();
  const heartbeat = setInterval(() => response.write(': still here\n\n'), heartbeatEveryMs).unref();
  response.on('close', () => {
    clearInterval(heartbeat);
    onClose();
  });
  return {
    send: (name, data) => void response.write(`event: ${name}\ndata: ${JSON.stringify(data)}\n\n`),
    end: () => void response.end(),
  };
}
