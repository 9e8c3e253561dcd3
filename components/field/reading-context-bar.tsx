'use client';

import { classNames } from '@/components/ui/class-names';

export type Picker = 'instrument' | 'steel' | 'measurer' | 'unit';

/** Instrument, steel touched, who reads and unit: always in view, changed by a tap, and no tap per reading. */
export function ReadingContextBar({
  instrument,
  instrumentNote,
  instrumentGood,
  steel,
  unit,
  readBy,
  onPick,
}: {
  instrument: string;
  instrumentNote: string;
  instrumentGood: boolean;
  steel: string;
  unit: string;
  /** Who reads the gauge while this person types; null: this person. */
  readBy: string | null;
  onPick: (which: Picker) => void;
}) {
  const cells: {
    which: Picker;
    label: string;
    value: string;
    note?: string;
    bad?: boolean;
    lines?: string;
    share: string;
  }[] = [
    {
      which: 'instrument',
      label: 'Instrument',
      value: instrument,
      note: instrumentNote,
      bad: !instrumentGood,
      share: 'flex-[4]',
    },
    { which: 'steel', label: 'To', value: steel, lines: 'line-clamp-2', share: 'flex-[4]' },
    {
      which: 'measurer',
      label: 'Read by',
      value: readBy?.split(' ')[0] ?? 'you',
      ...(readBy ? { note: 'to confirm' } : {}),
      share: 'flex-[3]',
    },
    { which: 'unit', label: 'Unit', value: unit, share: 'flex-[2]' },
  ];
  return (
    <div className="flex border-t border-ink bg-sheet">
      {cells.map((cell) => (
        <button
          key={cell.which}
          type="button"
          onClick={() => onPick(cell.which)}
          className={classNames(
            'min-h-14 min-w-14 border-r border-rule px-2.5 py-1 text-left font-label leading-tight font-semibold last:border-r-0',
            cell.share,
            cell.bad && 'text-hold',
          )}
        >
          <span className={classNames('block text-xs font-medium', !cell.bad && 'text-pencil')}>
            {cell.label}
          </span>
          <span className={cell.lines ?? 'line-clamp-1'}>{cell.value}</span>
          {cell.note && <span className="line-clamp-1 text-xs font-medium">{cell.note}</span>}
        </button>
      ))}
    </div>
  );
}
