/** What the window's flags depend on. */
export interface WindowOptions {
  readonly address: string;
  readonly profile: string;
  /** The browser's own sandbox can't be used by root. */
  readonly root: boolean;
}

/**
 * Flags that make a browser show one page as an application: a window without tabs, a profile of its
 * own, no extensions, and nothing that it would do on the network of its own accord.
 */
export function browserFlags({ address, profile, root }: WindowOptions): readonly string[] {
  return [
    `--app=${address}`,
    `--user-data-dir=${profile}`,
    '--no-first-run',
    '--no-default-browser-check',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
    '--disable-quic',
    '--disable-extensions',
    '--window-size=1440,900',
    '--password-store=basic',
    // --test-type keeps the browser from showing a bar about the missing sandbox.
    ...(root ? ['--no-sandbox', '--test-type'] : []),
  ];
}
