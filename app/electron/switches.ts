/** Switches of Chromium that are set before the app is ready, each with its reason. */
export const SWITCHES: readonly (readonly [name: string, value: string, reason: string])[] = [
  ['host-resolver-rules', 'MAP * ~NOTFOUND', 'No name is ever looked up: the app has no network.'],
  ['disable-background-networking', '', 'Chromium asks for nothing of its own accord.'],
  ['disable-component-update', '', 'Chromium fetches no components.'],
  ['disable-domain-reliability', '', 'Chromium reports no failures to anybody.'],
];
