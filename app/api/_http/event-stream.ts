/** One event of a stream: `id` lets a client that lost the connection go on where it stopped. */
export interface ServerEvent {
  id: number;
  event: string;
  data: unknown;
}

/** Milliseconds without an event after which a comment is sent, so that nothing in between takes the line for dead. */
const HEARTBEAT_MS = 15_000;
const RETRY_MS = 1_000;

/** Answers events as they come (`text/event-stream`); ends when the source ends or the client drops. */
export function eventStream(request: Request, source: (signal: AbortSignal) => AsyncIterable<ServerEvent>): Response {
  const encoder = new TextEncoder();
  const gone = new AbortController();
  request.signal.addEventListener('abort', () => gone.abort(), { once: true });
  const body = new ReadableStream<Uint8Array>({
    async start(controller) {
      const send = (text: string) => {
        if (!gone.signal.aborted) controller.enqueue(encoder.encode(text));
      };
      send(`retry: ${RETRY_MS}\n\n`);
      const heartbeat = setInterval(() => send(': still here\n\n'), HEARTBEAT_MS);
      try {
        for await (const { id, event, data } of source(gone.signal)) {
          send(`id: ${id}\nevent: ${event}\ndata: ${JSON.stringify(data)}\n\n`);
        }
      } finally {
        clearInterval(heartbeat);
        if (!gone.signal.aborted) controller.close();
      }
    },
    cancel() {
      gone.abort();
    },
  });
  return new Response(body, {
    headers: {
      'content-type': 'text/event-stream',
      'cache-control': 'no-store, no-transform',
      'x-accel-buffering': 'no',
    },
  });
}
