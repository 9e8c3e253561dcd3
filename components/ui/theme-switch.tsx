'use client';

import { useId, useSyncExternalStore } from 'react';
import { chooseTheme, readTheme, themes, watchTheme, type Theme } from './theme';

const words: Record<Theme, string> = { day: 'Day', night: 'Night', auto: 'As the device' };

/** Day for sun, night for the early morning, or as the device says; kept on this device. */
export function ThemeSwitch({ legend = 'Light' }: { legend?: string }) {
  const name = useId();
  const theme = useSyncExternalStore<Theme>(watchTheme, readTheme, () => 'auto');
  return (
    <fieldset>
      <legend className="font-label text-label font-semibold">{legend}</legend>
      <div className="mt-1 inline-flex border border-ink">
        {themes.map((choice) => (
          <label
            key={choice}
            className="relative grid min-h-target min-w-target place-items-center border-r border-ink px-pad font-label text-body font-medium last:border-r-0 has-checked:bg-ink has-checked:text-sheet has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-chalk"
          >
            <input
              type="radio"
              name={name}
              value={choice}
              checked={theme === choice}
              onChange={() => chooseTheme(choice)}
              className="absolute inset-0 size-full cursor-pointer opacity-0"
            />
            {words[choice]}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
