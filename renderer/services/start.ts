import type { Settings } from '../../app/host/contract.js';
import type { Engine } from '../engine.js';

/** Learns what the host knows at start, and opens what it was started with. */
export async function start({ client, store, bench, signal }: Engine): Promise<void> {
  const session = await client.session(signal);
  if (!session.ok) {
    const { text } = session.refusal;
    store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));
    return;
  }
  const { version, recent, settings, folders, openDemonstration, remarks } = session.value;
  const [remark] = remarks ?? [];
  store.change('Start', (state) => ({
    ...state,
    version,
    recent,
    settings,
    message: remark === undefined ? state.message : { tone: 'warning', text: remark.text },
  }));
  const folder = folders.at(-1);
  if (folder !== undefined) await bench.openFolder(folder);
  else if (openDemonstration === true) await bench.openDemonstration();
}

/** Changes settings: at once on the page, and in the host; the host's refusal is told. */
export async function changeSettings(
  { client, store, signal }: Engine,
  change: Partial<Settings>,
): Promise<void> {
  const settings = { ...store.now().settings, ...change };
  store.change('Change settings', (state) => ({ ...state, settings }));
  const saved = await client.saveSettings(settings, signal);
  if (saved.ok) return;
  const text = `The settings hold until the window closes; they could not be kept. ${saved.refusal.text}`;
  store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));
}
