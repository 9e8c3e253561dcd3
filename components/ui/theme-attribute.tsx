'use client';

import { useEffect } from 'react';
import { applyTheme, readTheme } from './theme';

/** Applies the theme that was chosen on this device, as soon as the page's script runs. */
export function ThemeAttribute() {
  useEffect(() => applyTheme(readTheme()), []);
  return null;
}
