import { formatLength, parseLength } from '@/lib/concrete/length';
import { exampleOf, isExample, type Draft, type Field, type FieldSet, unitsOf } from './field-spec';
import { quantities } from './quantities';

const BARE = /^[-−]?[\d./ -]*\d$/;

/** A typed text under other units: the same value, exactly, with its unit written where it is not the field's own. */
function restated(field: Field, text: string, from: 'mm' | 'in', to: 'mm' | 'in'): string {
  const kept = text.trim();
  if (field.kind === 'length') {
    const read = parseLength(kept, from);
    if (!read.ok || read.length.mm === null) return text;
    const there = formatLength(read.length.mm, to);
    const back = parseLength(there, to);
    if (back.ok && back.length.mm !== null && Math.abs(back.length.mm - read.length.mm) < 1e-9) return there;
    return BARE.test(kept) ? `${kept} ${from}` : text;
  }
  if (field.kind === 'quantity') {
    const { units } = quantities[field.quantity];
    if (BARE.test(kept)) return `${kept} ${units[from].sign}`;
    const own = ` ${units[to].sign}`;
    return kept.endsWith(own) ? kept.slice(0, -own.length) : text;
  }
  return text;
}

/**
 * The draft under other units. An untouched example gives way to the example in those units; what somebody typed keeps
 * its value exactly, so that a result is the same before and after.
 */
export function switchUnits(fields: FieldSet, draft: Draft, to: 'mm' | 'in'): Draft {
  const from = unitsOf(draft);
  if (from === to) return draft;
  if (isExample(fields, draft)) return exampleOf(fields, to);
  const next = Object.entries(fields).map(([name, field]) => [
    name,
    restated(field, draft[name] ?? '', from, to),
  ]);
  return { ...Object.fromEntries(next), units: to };
}
