import { ToneGlyph } from '@/components/ui/tone-glyph';
import { FROM_MEMORY } from '@/lib/concrete/trail-source';
import { provenanceWords, type TrailStep } from '@/lib/concrete/trail';

/** Said wherever a number rests on what nobody could look up. */
export function EditionMark() {
  return (
    <span className="inline-flex items-baseline gap-1.5 font-label text-label font-semibold text-watch">
      <ToneGlyph tone="watch" className="shrink-0 translate-y-0.5" />
      verify against your edition
    </span>
  );
}

/** Whether a step, or a part of it that its note tells, is from memory. */
export function isFromMemory(step: TrailStep): boolean {
  return step.provenance === 'memory' || Boolean(step.note?.includes('from memory'));
}

function noteOf(step: TrailStep): string | undefined {
  // The mark beside the step says that part of the note.
  const note = step.note?.replace(FROM_MEMORY, '').replace(/^\. /, '');
  return note || undefined;
}

/** How a result was found: each step with its clause, edition, where its text is known from, and its number. */
export function TrailList({ trail }: { trail: readonly TrailStep[] }) {
  return (
    <ol className="print:columns-3 print:gap-5">
      {trail.map((step, index) => (
        <li
          key={`${index}-${step.rule}`}
          className="grid gap-x-6 border-b border-rule py-1.5 break-inside-avoid sm:grid-cols-2 print:block print:py-0.5"
        >
          <div className="min-w-0">
            {step.rule}
            <span className="block text-label text-pencil">
              {[...new Set([step.clause, step.edition, provenanceWords[step.provenance]])]
                .filter(Boolean)
                .join(', ')}
              {step.note && noteOf(step) && `. ${noteOf(step)}`}
              {isFromMemory(step) && (
                <>
                  {' '}
                  <EditionMark />
                </>
              )}
            </span>
          </div>
          <div className="min-w-0 font-figure font-medium break-words sm:text-right print:text-left">
            {step.value}
          </div>
        </li>
      ))}
    </ol>
  );
}
