'use client';

import { useState } from 'react';
import { judgedClosing, type JudgedWords } from '@/lib/inspection/judged-words';
import { useTrail } from './judged-sources';
import { TrailSteps } from './trail-steps';

/**
 * "How was this judged?" beside a verdict: plain words, the arithmetic, and where the limits come from. What is inside
 * is made when it is opened: a face may have a thousand readings.
 */
export function JudgedDetails({
  judged,
  about,
}: {
  /** The trail of each source by name, where the page keeps it once for many verdicts. */
  judged: Omit<JudgedWords, 'sources'> & { sources: (JudgedWords['sources'][number] | { kept: string })[] };
  /** What was judged, for who hears the page instead of seeing it: "point B3". */
  about: string;
}) {
  const [open, setOpen] = useState(false);
  return (
    <details className="print:hidden" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary
        aria-label={`How was this judged? ${about}`}
        className="min-h-6 w-fit font-label text-label font-semibold text-chalk"
      >
        How was this judged?
      </summary>
      {open && (
        <div className="grid min-w-0 gap-2 py-1">
          <p>{judged.reason}</p>
          {judged.notes.map((note) => (
            <p key={note} className="border-l-[6px] border-watch pl-2 text-label">
              {note}
            </p>
          ))}
          {judged.lines.length > 0 && (
            <table className="w-full max-w-sm border-collapse font-figure">
              <tbody>
                {judged.lines.map(({ label, value, decides }) => (
                  <tr
                    key={label}
                    className={decides ? 'border-y border-ink font-semibold' : 'border-b border-rule'}
                  >
                    <th scope="row" className="py-0.5 pr-3 text-left font-label font-medium">
                      {label}
                    </th>
                    <td className="py-0.5 text-right">{value}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          )}
          <p className="text-label text-pencil">{judged.rule}</p>
          {judged.sources.map((source) => (
            <Source key={'kept' in source ? source.kept : source.heading} source={source} />
          ))}
          <p className="text-label text-pencil">{judgedClosing}</p>
        </div>
      )}
    </details>
  );
}

function Source({ source }: { source: JudgedWords['sources'][number] | { kept: string } }) {
  const kept = useTrail('kept' in source ? source.kept : null);
  const shown = 'kept' in source ? kept : source;
  if (!shown) return null;
  return (
    <section className="grid gap-1">
      <p className="font-label text-label font-semibold">{shown.heading}</p>
      {shown.warnings.map((warning) => (
        <p key={warning} className="border-l-[6px] border-watch pl-2 text-label">
          {warning}
        </p>
      ))}
      <TrailSteps trail={shown.trail} />
    </section>
  );
}
