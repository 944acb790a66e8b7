const KEPT_UNDER = 'diptych-token';

/**
 * The token of the browser shell. It comes in the address's fragment and is erased from the address at once, so that
 * it stays out of the history and of screenshots. It is kept for this tab alone, so that the page can be loaded
 * again; the host makes another one at each start. Undefined in the Electron shell, whose scheme nobody else can reach.
 */
export function takeToken(
  location: Pick<Location, 'hash' | 'pathname' | 'search'>,
  history: Pick<History, 'replaceState'>,
  tab: Pick<Storage, 'getItem' | 'setItem'>,
): string | undefined {
  const fragment = location.hash.replace(/^#/, '');
  if (fragment === '') return tab.getItem(KEPT_UNDER) ?? undefined;
  history.replaceState(null, '', location.pathname + location.search);
  tab.setItem(KEPT_UNDER, fragment);
  return fragment;
}
