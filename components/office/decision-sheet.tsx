'use client';

import { useState, type ReactNode } from 'react';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { DispositionForm, type DispositionFormProps } from './disposition-form';

const parts = [
  { key: 'requirement', word: 'the requirement' },
  { key: 'extent', word: 'the extent' },
  { key: 'photos', word: 'the photographs' },
] as const;
type Part = (typeof parts)[number]['key'];

/**
 * What the engineer reads before a decision, in three parts that have to be opened, and the decision itself. Quick is
 * good, haste is not: it can be signed once all three have been looked at.
 */
export function DecisionSheet({
  requirement,
  extent,
  photos,
  counts,
  form,
}: {
  requirement: ReactNode;
  extent: ReactNode;
  photos: ReactNode;
  /** In short what is inside each part, on its closed line. */
  counts: Record<Part, string>;
  /** Null: this person does not decide. */
  form: Omit<DispositionFormProps, 'unopened'> | null;
}) {
  const [opened, setOpened] = useState<ReadonlySet<Part>>(new Set());
  const content: Record<Part, ReactNode> = { requirement, extent, photos };
  const heads: Record<Part, string> = {
    requirement: 'Requirement and clause, and what was measured',
    extent: 'Extent, and where on the drawing',
    photos: 'Photographs',
  };
  const decide = (props: Omit<DispositionFormProps, 'unopened'>) => (
    <DispositionForm
      {...props}
      unopened={parts.filter(({ key }) => !opened.has(key)).map(({ word }) => word)}
    />
  );
  return (
    <>
      {parts.map(({ key }) => (
        <details
          key={key}
          className="sheet-frame print:[&::details-content]:[content-visibility:visible]"
          onToggle={(event) => {
            if (event.currentTarget.open) setOpened((before) => new Set(before).add(key));
          }}
        >
          <summary className="flex min-h-target flex-wrap items-center justify-between gap-x-4 px-4 py-2">
            <h2 className="text-heading">{heads[key]}</h2>
            <span className="font-label text-label font-medium text-pencil">
              {counts[key]}
              {opened.has(key) ? (
                <span className="print:hidden">, opened</span>
              ) : (
                <span className="text-chalk print:hidden">, open to look</span>
              )}
            </span>
          </summary>
          <div className="border-t border-rule px-4 py-3">{content[key]}</div>
        </details>
      ))}
      {form && (
        <SheetFrame heading="The decision" className="print:hidden">
          {form.replaces ? (
            <details>
              <summary className="min-h-target w-fit font-label font-semibold text-chalk">
                Decide again
              </summary>
              {decide(form)}
            </details>
          ) : (
            decide(form)
          )}
        </SheetFrame>
      )}
    </>
  );
}
