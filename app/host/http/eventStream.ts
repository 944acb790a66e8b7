/** Sends one server-sent event; nothing happens when its reader has gone. */
export type SendEvent = (event: string, data: unknown) => void;

/** Time between the comments that keep a silent stream alive and find out that its reader is gone, ms. */
const HEARTBEAT_MS = 15_000;

/** What runs behind a stream. */
export interface EventStreamOptions {
  /** Aborted when the request is. */
  readonly signal: AbortSignal;
  /** Runs while the stream is open; the stream ends when it does. Its signal is aborted when the reader goes. */
  readonly run: (send: SendEvent, signal: AbortSignal) => Promise<void>;
  /** Called when `run` fails in a way that it did not expect. The stream is then ended as a failure. */
  readonly onError: (error: unknown) => void;
}

/** A response of server-sent events (WHATWG HTML, section 9.2), each with its data as one line of JSON. */
export function eventStream({ signal, run, onError }: EventStreamOptions): Response {
  const encoder = new TextEncoder();
  const gone = new AbortController();
  const leave = (): void => gone.abort();
  let timer: NodeJS.Timeout | undefined;

  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      const write = (text: string): void => {
        if (!gone.signal.aborted) controller.enqueue(encoder.encode(text));
      };
      if (signal.aborted) leave();
      else signal.addEventListener('abort', leave, { once: true });
      // The first comment makes the head of the response go out at once.
      write(': open\n\n');
      timer = setInterval(() => write(':\n\n'), HEARTBEAT_MS);
      run((event, data) => write(`event: ${event}\ndata: ${JSON.stringify(data)}\n\n`), gone.signal)
        .then(
          () => controller.close(),
          (error: unknown) => {
            if (!gone.signal.aborted) onError(error);
            controller.error(error);
          },
        )
        .catch(() => {
          // The reader cancelled the stream: there is nothing left to close.
        })
        .finally(() => {
          clearInterval(timer);
          signal.removeEventListener('abort', leave);
        });
    },
    cancel: leave,
  });
  return new Response(body, { headers: { 'Content-Type': 'text/event-stream' } });
}
