/** How something stands, in the four colours of the sheet; a word or a shape always says the same beside it. */
export type Tone = 'plain' | 'info' | 'watch' | 'hold' | 'met';

export const toneText: Record<Tone, string> = {
  plain: 'text-ink',
  info: 'text-chalk',
  watch: 'text-watch',
  hold: 'text-hold',
  met: 'text-met',
};

/** Filled with the tone, lettered in the sheet's colour. */
export const toneFill: Record<Tone, string> = {
  plain: 'bg-sheet text-ink',
  info: 'bg-chalk text-sheet',
  watch: 'bg-watch text-sheet',
  hold: 'bg-hold text-sheet',
  met: 'bg-met text-sheet',
};

export const toneBorder: Record<Tone, string> = {
  plain: 'border-ink',
  info: 'border-chalk',
  watch: 'border-watch',
  hold: 'border-hold',
  met: 'border-met',
};
