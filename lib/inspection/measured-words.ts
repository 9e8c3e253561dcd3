import { formatLength, withUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import { asEntered } from './length-as-entered';
import type { MeasuredValue } from './measured-value';
import type { MeasurementItem } from './measurement-item';
import type { Plan } from './plan';

/** Where a tendon's height is taken from and to, in words. */
export const datumWords = {
  soffit: 'the soffit',
  top: 'the top',
  underside: 'the underside',
  centre: 'the centre',
  topside: 'the top side',
} as const;

export const pulledWords = {
  held: 'held when pulled',
  moved: 'moved when pulled',
  'not-pulled': 'not pulled',
} as const;

export const marksWords = {
  'both-in': 'both bars to their marks',
  'one-short': 'a bar short of its mark',
  'not-marked': 'no witness marks',
} as const;

/** A measured value as it was entered: "142 mm", "12", "38 of 49 tied", "Ø16", "620 mm, held when pulled". */
export function measuredText(value: MeasuredValue): string {
  switch (value.quantity) {
    case 'length':
      return asEntered(value.length);
    case 'count':
      return String(value.count);
    case 'share':
      return `${value.tied} of ${value.of} tied${value.atEdge ? ', at an edge' : ''}`;
    case 'designation':
      return value.designation;
    case 'part':
      return `${value.count} of ${value.of}`;
    case 'starter':
      return `${asEntered(value.length)}, ${pulledWords[value.pulled]}`;
    case 'coupler': {
      const threads = value.threads === null ? '' : `, ${value.threads} threads in sight`;
      return `${value.type}, ${marksWords[value.marks]}${threads}`;
    }
    case 'damage':
      return damageText(value);
    case 'height':
      return `${asEntered(value.length)} from ${datumWords[value.from]} to ${datumWords[value.to]} of the tendon`;
    case 'ticket': {
      const dosage = value.kgPerM3 === null ? 'no dosage' : `${numberText(value.kgPerM3, 3)} kg/m³`;
      const ticket = value.ticket ? `ticket ${value.ticket}: ` : '';
      return `${ticket}${value.fibreType || 'no fibre named'}, ${dosage}`;
    }
  }
}

function damageText({ spots, bareCutEnds, flameCutEnds }: Extract<MeasuredValue, { quantity: 'damage' }>) {
  const of = (kind: 'damaged' | 'patched') => spots.filter((spot) => spot.kind === kind).length;
  const words = [
    [of('damaged'), 'damaged spot', 'damaged spots'],
    [of('patched'), 'patch', 'patches'],
    [bareCutEnds, 'bare cut end', 'bare cut ends'],
    [flameCutEnds, 'flame-cut end', 'flame-cut ends'],
  ] as const;
  const found = words.filter(([count]) => count > 0);
  if (found.length === 0) return 'no damage';
  return found.map(([count, one, more]) => `${count} ${count === 1 ? one : more}`).join(', ');
}

/** What has to be met, in words: "at least 1 200 mm", "at most 50 %", "Ø16". */
export function limitWords(item: MeasurementItem, units: Plan['units']): string {
  if (item.quantity === 'designation') return `planned ${item.expected ?? 'nothing named'}`;
  const { against } = item;
  switch (against?.by) {
    case 'epoxy':
      return `any damage repaired; at most ${numberText(against.damagedMostPercent, 3)} % damaged and ${numberText(against.patchedMostPercent, 3)} % patched in any foot`;
    case 'frp':
      return `at most ${numberText(against.mostPercent, 3)} % damaged in any metre`;
    case 'coupler':
      return `${against.type}, both bars to their marks${against.mostThreads === null ? '' : `, at most ${against.mostThreads} threads in sight`}`;
    case 'fibre':
      return `${against.type}, at least ${numberText(item.least ?? 0, 3)} kg/m³`;
    case 'datum':
      return `${rangeWords(item, units)} from ${datumWords[against.from]} to ${datumWords[against.to]} of the tendon`;
    case 'tie-pattern':
      if (against.perimeterApart) return 'every intersection on the perimeter, every other one inside';
      break;
    case undefined:
      break;
  }
  const words = rangeWords(item, units);
  return item.quantity === 'starter' ? `${words}, and held when pulled` : words;
}

function rangeWords({ quantity, least, most }: MeasurementItem, units: Plan['units']): string {
  const isLength = quantity === 'length' || quantity === 'starter' || quantity === 'height';
  const unit = quantity === 'share' || quantity === 'part' ? ' %' : '';
  const show = (value: number) => (isLength ? withUnit(value, units) : `${formatLength(value, 'mm')}${unit}`);
  if (least !== null && most !== null) return `${show(least)} to ${show(most)}`;
  if (least !== null) return `at least ${show(least)}`;
  return most === null ? 'no limit' : `at most ${show(most)}`;
}
