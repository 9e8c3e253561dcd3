export const themes = ['day', 'night', 'auto'] as const;
export type Theme = (typeof themes)[number];

const key = 'cagewright.theme';
const changed = 'cagewright:theme';

/** The theme chosen on this device; `auto` where none is, or where the device keeps nothing. */
export function readTheme(): Theme {
  try {
    const kept = window.localStorage.getItem(key);
    return kept === 'day' || kept === 'night' ? kept : 'auto';
  } catch {
    return 'auto';
  }
}

/** Keeps the choice on this device and applies it. Where nothing can be kept it holds until the page is left. */
export function chooseTheme(theme: Theme): void {
  try {
    if (theme === 'auto') window.localStorage.removeItem(key);
    else window.localStorage.setItem(key, theme);
  } catch {
    // Private windows may refuse storage; the attribute below still counts for this page.
  }
  applyTheme(theme);
  window.dispatchEvent(new Event(changed));
}

/** Writes `data-theme` on the root; `auto` leaves it to the device. */
export function applyTheme(theme: Theme): void {
  if (theme === 'auto') delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = theme;
}

/** Calls `listener` when the choice changes, here or in another tab; returns what stops it. */
export function watchTheme(listener: () => void): () => void {
  window.addEventListener(changed, listener);
  window.addEventListener('storage', listener);
  return () => {
    window.removeEventListener(changed, listener);
    window.removeEventListener('storage', listener);
  };
}
