import type { HostClient } from '../host/client.js';
import type { Store } from '../state/store.js';

/** Wait before the host is called again after its stream ended, ms. */
const AGAIN_MS = 2000;
/** Tries after which the host counts as gone. */
const TRIES = 4;

/** Holds the stream that tells the host that the page lives; says so when the host is gone. */
export async function keepPresence(
  client: Pick<HostClient, 'presence'>,
  store: Store,
  signal: AbortSignal,
): Promise<void> {
  for (let failed = 0; failed < TRIES && !signal.aborted; ) {
    const began = performance.now();
    await client.presence(signal);
    if (signal.aborted) return;
    // A stream that held for a while was a living host: only failures in a row count.
    failed = performance.now() - began > 2 * AGAIN_MS ? 1 : failed + 1;
    await new Promise((resolve) => setTimeout(resolve, AGAIN_MS));
  }
  const text =
    'The program behind this window has ended. Close the window and start Diptych again; what is shown as saved is kept.';
  store.change('Host gone', (state) => ({ ...state, message: { tone: 'warning', text } }));
}
