import type { ReactNode } from 'react';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import type { Evaluation } from './evaluate';
import type { FieldSet } from './field-spec';
import { FiguresList } from './figures-list';
import { EditionMark, isFromMemory } from './trail-list';

const GOVERNS =
  'The contract documents and the local code decide. Figures here are decision support for a licensed engineer; nothing here replaces the required inspection by qualified people.';

/** The sentences of several cautions, each once: estimates share some of theirs. */
function uniqueSentences(cautions: readonly string[]): string {
  return [...new Set(cautions.flatMap((caution) => caution.split(/(?<=\.) (?=[A-Z])/)))].join(' ');
}

/** The result with its drawing, its warnings and its cautions, or why there is none. */
export function ResultPanel({
  evaluation,
  fields,
  drawing,
  printDrawing,
}: {
  evaluation: Evaluation<unknown>;
  fields: FieldSet;
  drawing: ReactNode;
  /** Whether the drawing is printed here, or elsewhere on the page. */
  printDrawing: boolean;
}) {
  const { answer, problems, general } = evaluation;
  if (!answer) {
    return (
      <div role="status" className="grid gap-2 border border-dashed border-pencil p-3">
        <p className="flex items-center gap-2 font-label text-lead font-semibold">
          <ToneGlyph tone="hold" className="text-hold" />
          No result
        </p>
        <p>Put this right and the result is here again:</p>
        <ul className="list-disc pl-5">
          {Object.entries(problems).map(([name, problem]) => (
            <li key={name}>
              <b>{fields[name]?.label}</b>: {problem}
            </li>
          ))}
          {general.map((problem) => (
            <li key={problem}>{problem}</li>
          ))}
        </ul>
      </div>
    );
  }
  const main = answer.figures.filter((figure) => figure.main);
  const told = main.length > 0 ? main : answer.figures.slice(0, 2);
  return (
    <div className="grid gap-4 *:min-w-0 print:gap-2">
      <div className={printDrawing ? 'print:max-w-md' : 'print:hidden'}>{drawing}</div>
      <div>
        <FiguresList figures={answer.figures} />
        {answer.trail.some(isFromMemory) && (
          <p className="mt-1.5">
            <EditionMark /> <span className="text-label text-pencil">the steps that say “from memory”</span>
          </p>
        )}
      </div>
      {/* Read out as it changes; the list above is for the eye. */}
      <p role="status" className="sr-only">
        {told.map((figure) => `${figure.label}: ${figure.text}`).join('. ')}
      </p>
      {answer.warnings.map((warning) => (
        <p key={warning} className="border-l-[6px] border-watch pl-3 text-watch">
          {warning}
        </p>
      ))}
      <div className="grid gap-1 border-l-[6px] border-watch pl-3 text-label">
        <p>{uniqueSentences(answer.cautions)}</p>
        <p>{GOVERNS}</p>
      </div>
    </div>
  );
}
