import { createParser } from 'eventsource-parser';

/** One server-sent event: its name ('message' when the host gave none) and its data as text. */
export interface StreamEvent {
  readonly name: string;
  readonly data: string;
}

/**
 * Hands each server-sent event of a response to `onEvent`, until the stream ends. Fetch is used and not
 * EventSource, because only fetch can carry the bearer token.
 */
export async function readEventStream(
  body: ReadableStream<Uint8Array>,
  onEvent: (event: StreamEvent) => void,
): Promise<void> {
  const parser = createParser({
    onEvent: ({ event, data }) => onEvent({ name: event ?? 'message', data }),
  });
  const reader = body.getReader();
  const decoder = new TextDecoder();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) return;
    parser.feed(decoder.decode(value, { stream: true }));
  }
}
