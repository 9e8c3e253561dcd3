import { parseLength } from '@/lib/concrete/length';
import { isShown, unitsOf, type Draft, type Field, type FieldSet } from './field-spec';
import { quantities } from './quantities';

/** An input in words, with the unit that it was read in. */
export function inputText(field: Field, text: string, draft: Draft): string {
  const kept = text.trim();
  if (field.kind === 'choice') return (field.choices as Readonly<Record<string, string>>)[kept] ?? kept;
  if (field.kind === 'check' || kept === '') return kept;
  const units = unitsOf(draft);
  if (field.kind === 'length') {
    const bare = parseLength(kept);
    return bare.ok && bare.length.unit === null ? `${kept} ${units}` : kept;
  }
  if (field.kind === 'quantity') {
    return /\d$/.test(kept) ? `${kept} ${quantities[field.quantity].units[units].sign}` : kept;
  }
  return field.kind === 'number' && field.unit && !kept.endsWith(field.unit) ? `${kept} ${field.unit}` : kept;
}

/** What was put in, for the printed sheet. */
export function InputsList({ fields, draft }: { fields: FieldSet; draft: Draft }) {
  const rows = Object.entries(fields).flatMap(([name, field]) => {
    const text = inputText(field, draft[name] ?? '', draft);
    return isShown(field, draft) && text !== '' && name !== 'units'
      ? [{ name, label: field.label, text }]
      : [];
  });
  return (
    <dl className="hidden print:grid print:grid-cols-1">
      {rows.map((row) => (
        <div key={row.name} className="flex justify-between gap-x-4 border-b border-rule py-0.5">
          <dt className="text-pencil">{row.label}</dt>
          <dd className="text-right font-figure font-medium">{row.text}</dd>
        </div>
      ))}
    </dl>
  );
}
