import { parseLength, type LengthUnit } from '@/lib/concrete/length';
import type { DamagedSpot, MeasuredValue } from '@/lib/inspection/measured-value';

/** One spot of damage or repair while it is being entered, all as typed. */
export interface SpotDraft {
  kind: DamagedSpot['kind'];
  from: string;
  length: string;
  width: string;
}

/** What was found on a coated or polymer bar while it is being entered. */
export interface DamageDraft {
  quantity: 'damage';
  spots: readonly SpotDraft[];
  barLength: string;
  bareCutEnds: string;
  flameCutEnds: string;
}

export const emptyDamage = (): DamageDraft => ({
  quantity: 'damage',
  spots: [],
  barLength: '',
  bareCutEnds: '',
  flameCutEnds: '',
});

export const emptySpot = (): SpotDraft => ({ kind: 'damaged', from: '', length: '', width: '' });

class DamageProblem extends Error {}

function lengthOf(text: string, unit: LengthUnit, words: string): number {
  const read = parseLength(text, unit);
  if (!read.ok) throw new DamageProblem(`${words}: ${read.problem}`);
  if (read.length.mm === null) throw new DamageProblem(`${words}: write the unit too.`);
  return read.length.mm;
}

function countOf(text: string, words: string): number {
  if (text.trim() === '') return 0;
  if (!/^\d+$/.test(text.trim())) throw new DamageProblem(`${words}: write a whole number.`);
  return Number(text);
}

/** What is recorded, or what is wrong with it; a spot's area is its length times its width. */
export function readDamage(
  draft: DamageDraft,
  unit: LengthUnit,
): { ok: true; value: MeasuredValue } | { ok: false; problem: string } {
  try {
    const spots = draft.spots.map((spot, index): DamagedSpot => {
      const at = (what: string) => `Spot ${index + 1}, ${what}`;
      const lengthMm = lengthOf(spot.length, unit, at('length'));
      const widthMm = lengthOf(spot.width, unit, at('width'));
      if (lengthMm === 0 || widthMm === 0) throw new DamageProblem(`${at('size')}: more than zero.`);
      const fromMm = spot.from.trim() === '' ? 0 : lengthOf(spot.from, unit, at('place'));
      return { kind: spot.kind, fromMm, lengthMm, areaMm2: lengthMm * widthMm };
    });
    const barLengthMm =
      draft.barLength.trim() === '' ? null : lengthOf(draft.barLength, unit, 'Length of the bar');
    const bareCutEnds = countOf(draft.bareCutEnds, 'Bare cut ends');
    const flameCutEnds = countOf(draft.flameCutEnds, 'Flame-cut ends');
    return { ok: true, value: { quantity: 'damage', spots, barLengthMm, bareCutEnds, flameCutEnds } };
  } catch (error) {
    if (error instanceof DamageProblem) return { ok: false, problem: error.message };
    throw error;
  }
}
