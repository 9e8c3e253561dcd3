import { MarkIcon } from '@/components/drawings/mark';
import { classNames } from '@/components/ui/class-names';
import type { Figure } from './calculation';

/** The numbers of a result, ruled, each with its formula and source. */
export function FiguresList({ figures }: { figures: readonly Figure[] }) {
  return (
    <dl>
      {figures.map((figure) => (
        <div
          key={figure.id}
          className="grid grid-cols-[minmax(0,1fr)_auto] items-baseline gap-x-4 border-b border-rule py-1.5 print:py-0.5"
        >
          <dt className={figure.main ? 'font-label text-lead font-semibold' : undefined}>{figure.label}</dt>
          <dd
            className={classNames(
              'text-right sm:max-w-[22rem]',
              figure.main ? 'whitespace-nowrap' : 'max-w-[9.5rem]',
              figure.words ? 'font-label font-semibold' : 'font-figure font-medium',
              figure.main && 'text-heading',
            )}
          >
            {figure.mark && <MarkIcon kind={figure.mark} className="mr-1.5" />}
            {figure.text}
            {figure.also && (
              <span className="block font-figure print:ml-2 print:inline text-label font-medium text-pencil">
                {figure.also}
              </span>
            )}
          </dd>
          {(figure.formula ?? figure.source) && (
            <dd className="col-span-2 text-label text-pencil">
              {figure.formula && <span className="font-figure">{figure.formula}</span>}
              {figure.formula && figure.source && '; '}
              {figure.source}
            </dd>
          )}
        </div>
      ))}
    </dl>
  );
}
