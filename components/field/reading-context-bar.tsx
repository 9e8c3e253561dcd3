'use client';

import { classNames } from '@/components/ui/class-names';

export type Picker = 'instrument' | 'steel' | 'unit';

/** Instrument, steel touched and unit: always in view, changed by a tap, and no tap per reading. */
export function ReadingContextBar({
  instrument,
  instrumentNote,
  instrumentGood,
  steel,
  unit,
  onPick,
}: {
  instrument: string;
  instrumentNote: string;
  instrumentGood: boolean;
  steel: string;
  unit: string;
  onPick: (which: Picker) => void;
}) {
  const cells: {
    which: Picker;
    label: string;
    value: string;
    note?: string;
    bad?: boolean;
    share: string;
  }[] = [
    {
      which: 'instrument',
      label: 'Instrument',
      value: instrument,
      note: instrumentNote,
      bad: !instrumentGood,
      share: 'flex-[5]',
    },
    { which: 'steel', label: 'To', value: steel, share: 'flex-[5]' },
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
          <span className="line-clamp-1">{cell.value}</span>
          {cell.note && <span className="line-clamp-1 text-xs font-medium">{cell.note}</span>}
        </button>
      ))}
    </div>
  );
}
