import { createParser } from 'eventsource-parser';

/** Every server-sent event of a response that ends, read by an independent parser. */
export async function readEvents(
  response: Response,
): Promise<readonly { readonly event: string | undefined; readonly data: unknown }[]> {
  const events: { event: string | undefined; data: unknown }[] = [];
  const parser = createParser({
    onEvent: ({ event, data }) => events.push({ event, data: JSON.parse(data) }),
  });
  parser.feed(await response.text());
  return events;
}
