'use client';

import { useCallback, useState } from 'react';
import { fixLanguages, type FixLanguage } from './fix-list-words';

const KEY = 'cagewright.fix-language';

function remembered(): FixLanguage {
  try {
    const kept = window.localStorage.getItem(KEY);
    const known = fixLanguages.find((one) => one === kept);
    if (known) return known;
  } catch {
    // A store that cannot be read: the device's language decides.
  }
  return navigator.language.toLowerCase().startsWith('es') ? 'es' : 'en';
}

/** The language of the fix list: as last chosen on this device, else the device's own. */
export function useFixLanguage(): [FixLanguage, (language: FixLanguage) => void] {
  const [language, setLanguage] = useState<FixLanguage>(remembered);
  const choose = useCallback((chosen: FixLanguage) => {
    setLanguage(chosen);
    try {
      window.localStorage.setItem(KEY, chosen);
    } catch {
      // Full or forbidden: it holds until the page is left.
    }
  }, []);
  return [language, choose];
}
