/** Which worksheet this tab has open, so that reloading a tab shows its own worksheet and not another tab's. */

const KEY = 'levelwright worksheet';

/** The worksheet that this tab had open before it was reloaded, or null. */
export function worksheetOfThisTab(): string | null {
  try {
    return sessionStorage.getItem(KEY);
  } catch {
    // Storage is switched off: the tab remembers nothing.
    return null;
  }
}

/** Remembers the worksheet that this tab has open. */
export function rememberInThisTab(id: string): void {
  try {
    sessionStorage.setItem(KEY, id);
  } catch {
    // As above: after a reload the page shows the worksheet that was open last in any tab.
  }
}
