'use client';

import { useMemo, type ReactNode } from 'react';
import { FormProvider, useForm, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { classNames } from '@/components/ui/class-names';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { TitleBlock } from '@/components/ui/title-block';
import type { Calculation } from './calculation';
import { calculationOf, type CalculationSlug } from './calculation-list';
import { CopyLink } from './copy-link';
import { evaluate } from './evaluate';
import { isExample, isShown, type Draft, type FieldSet } from './field-spec';
import { InputsForm } from './inputs-form';
import { InputsList } from './inputs-list';
import { LeftOutNotice } from './left-out-notice';
import { queryOf, type OpenedLink } from './link';
import { ResultPanel } from './result-panel';
import { TrailList } from './trail-list';
import { useAddress } from './use-address';
import { origin, today, useInBrowser } from './use-in-browser';

const shownCount = (fields: FieldSet, draft: Draft) =>
  Object.values(fields).filter((field) => isShown(field, draft)).length;

/** A calculation on its sheet: inputs, the result as they are typed, its drawing and its trail; one page when printed. */
export function CalculationSheet<Fields extends FieldSet, Scene>({
  slug,
  calculation,
  opened,
  draw,
}: {
  slug: CalculationSlug;
  calculation: Calculation<Fields, Scene>;
  opened: OpenedLink;
  draw: (scene: Scene) => ReactNode;
}) {
  const { fields, groups } = calculation;
  const { title, by } = calculationOf(slug);
  const form = useForm<Draft>({ defaultValues: opened.draft });
  const typed = useWatch({ control: form.control });
  const draft = useMemo(() => ({ ...opened.draft, ...typed }) as Draft, [opened.draft, typed]);
  const evaluation = useMemo(() => evaluate(calculation, draft), [calculation, draft]);
  const query = queryOf(fields, draft);
  const date = useInBrowser(today);
  const at = useInBrowser(origin);
  useAddress(query);
  const { answer } = evaluation;
  // On paper: the drawing goes where there is room, and much to print takes smaller letters to stay on one page.
  const drawnBesideFigures = (answer?.figures.length ?? 0) <= 6;
  const dense = (answer?.trail.length ?? 0) > 10 || shownCount(fields, draft) > 14;
  const path = `/calculations/${slug}?${query}`;
  return (
    <FormProvider {...form}>
      <div
        className={classNames(
          'grid gap-6 *:min-w-0 print:gap-2 print:text-[0.7rem] print:leading-snug print:[--text-body:0.7rem]',
          'print:[--text-heading:0.95rem] print:[--text-label:0.64rem] print:[--text-lead:0.8rem]',
          dense && 'print:[zoom:0.84]',
        )}
      >
        <div className="flex flex-wrap items-center gap-3 print:hidden">
          <h1 className="mr-auto w-full text-title sm:w-auto">{title}</h1>
          <CopyLink path={path} />
          <Button onClick={() => window.print()}>Print</Button>
        </div>
        <LeftOutNotice leftOut={opened.leftOut} assumed={opened.assumed} />
        <div className="grid items-start gap-6 *:min-w-0 lg:grid-cols-[minmax(0,5fr)_minmax(0,6fr)] print:grid-cols-[2fr_3fr] print:gap-3 print:*:[line-height:1.3]">
          <div className="hidden border-[1.5px] border-ink print:col-span-2 print:block">
            <TitleBlock
              cells={[
                { label: 'Calculation', value: title, grow: 2 },
                { label: 'By', value: by, grow: 3 },
                { label: 'Date', value: date, grow: 1 },
              ]}
            />
          </div>
          <SheetFrame
            heading="Inputs"
            aside={isExample(fields, draft) ? 'an example: put in your own' : undefined}
          >
            <InputsForm {...{ fields, groups, draft }} problems={evaluation.problems} />
            <InputsList fields={fields} draft={draft} />
            {answer && !drawnBesideFigures && (
              <div className="hidden pt-3 print:block">{draw(answer.scene)}</div>
            )}
          </SheetFrame>
          <SheetFrame heading="Result" className="lg:sticky lg:top-4">
            <ResultPanel
              {...{ evaluation, fields }}
              drawing={answer && draw(answer.scene)}
              printDrawing={drawnBesideFigures}
            />
          </SheetFrame>
          <SheetFrame heading="How it was found" className="lg:col-span-2 print:col-span-2">
            {answer ? (
              <TrailList trail={answer.trail} />
            ) : (
              <p className="text-pencil">The steps follow with the result.</p>
            )}
          </SheetFrame>
        </div>
        {/* On a small screen the result is far from the keys that change it. */}
        <p
          aria-hidden="true"
          className="sticky bottom-0 z-10 -mx-4 flex justify-between gap-4 border-t-[1.5px] border-ink bg-sheet px-4 py-2 empty:hidden font-label text-lead font-semibold lg:hidden print:hidden"
        >
          {answer ? (
            answer.figures
              .filter((figure) => figure.main)
              .map((figure) => (
                <span key={figure.id} className="contents">
                  <span>{figure.label}</span>
                  <span className="text-right font-figure font-medium">{figure.text}</span>
                </span>
              ))
          ) : (
            <span className="text-hold">No result: see the marked fields</span>
          )}
        </p>
        <p className="hidden font-figure text-[0.6rem] break-all print:block">{`${at}${path}`}</p>
      </div>
    </FormProvider>
  );
}
