'use client';

import { judgedClosing, type JudgedSource, type JudgedWords } from '@/lib/inspection/judged-words';
import { RequirementTrail } from './requirement-trail';

/** How something was judged: plain words, the arithmetic, the rule, and where the limits come from. */
export function JudgedBody({ judged }: { judged: JudgedWords }) {
  return (
    <div className="grid gap-4">
      <p>{judged.reason}</p>
      {judged.notes.map((note) => (
        <p key={note} className="font-semibold text-watch">
          {note}
        </p>
      ))}
      {judged.lines.length > 0 && (
        <table className="w-full border-collapse font-figure text-body">
          <tbody>
            {judged.lines.map(({ label, value, decides }) => (
              <tr
                key={label}
                className={decides ? 'border-y border-ink font-semibold' : 'border-b border-rule'}
              >
                <th scope="row" className="py-1.5 pr-3 text-left font-label font-medium">
                  {label}
                </th>
                <td className="py-1.5 text-right">{value}</td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      <p className="text-label text-pencil">{judged.rule}</p>
      {judged.sources.map((source) => (
        <Source key={source.heading} source={source} />
      ))}
      <p className="text-label text-pencil">{judgedClosing}</p>
    </div>
  );
}

function Source({ source }: { source: JudgedSource }) {
  return (
    <section className="grid gap-1">
      <h3 className="font-label font-semibold">{source.heading}</h3>
      {source.warnings.map((warning) => (
        <p key={warning} className="text-label font-semibold text-watch">
          {warning}
        </p>
      ))}
      {source.trail.length > 0 && <RequirementTrail trail={source.trail} />}
    </section>
  );
}
