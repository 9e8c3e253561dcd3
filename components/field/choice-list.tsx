'use client';

import { useId, type ReactNode } from 'react';

/** One of several, each a wide line for a gloved thumb. */
export function ChoiceList({
  legend,
  choices,
  value,
  onChoose,
  error,
}: {
  legend: ReactNode;
  choices: readonly { value: string; label: ReactNode; detail?: ReactNode }[];
  value: string;
  onChoose: (value: string) => void;
  error?: string | null;
}) {
  const name = useId();
  return (
    <fieldset aria-describedby={error ? `${name}-error` : undefined}>
      <legend className="mb-1 font-label text-label font-semibold">{legend}</legend>
      <div className="border border-ink">
        {choices.map((choice) => (
          <label
            key={choice.value}
            className="flex min-h-target items-center gap-3 border-b border-rule px-3 py-1.5 last:border-b-0 has-checked:bg-paper has-focus-visible:outline-3 has-focus-visible:-outline-offset-3 has-focus-visible:outline-chalk"
          >
            <input
              type="radio"
              name={name}
              value={choice.value}
              checked={choice.value === value}
              onChange={() => onChoose(choice.value)}
              className="size-6 shrink-0 accent-chalk"
            />
            <span>
              <span className="block font-label font-semibold">{choice.label}</span>
              {choice.detail && <span className="block text-label text-pencil">{choice.detail}</span>}
            </span>
          </label>
        ))}
      </div>
      {error && (
        <p id={`${name}-error`} role="alert" className="mt-1 font-label text-label font-semibold text-hold">
          {error}
        </p>
      )}
    </fieldset>
  );
}
