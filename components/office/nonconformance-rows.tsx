import Link from 'next/link';
import { ToneGlyph } from '@/components/ui/tone-glyph';
import { toneText } from '@/components/ui/tone';
import { judgedNonconformance } from '@/lib/inspection/judged-nonconformance';
import type { NonconformanceState, NonconformanceStatus } from '@/lib/inspection/sheet-types';
import { JudgedDetails } from './judged-details';
import { decisionWords, nonconformanceWords } from './state-words';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime, timeAway } from './project-time';

/** How a nonconformance stands, in shape, colour and word. */
export function NonconformanceStand({ status }: { status: NonconformanceStatus }) {
  const { word, tone } = nonconformanceWords[status];
  return (
    <span className={`inline-flex items-center gap-1.5 font-label font-semibold ${toneText[tone]}`}>
      <ToneGlyph tone={tone} />
      {word}
    </span>
  );
}

/** The nonconformances of one pour, with the decision on each and what it asks for. */
export function NonconformanceRows({
  nonconformances,
  viewer,
}: {
  nonconformances: readonly NonconformanceState[];
  viewer: OfficeViewer;
}) {
  if (nonconformances.length === 0) return <p className="text-pencil">None has been raised.</p>;
  return (
    <ul>
      {nonconformances.map((state) => {
        const { body } = state.entry;
        return (
          <li key={state.entry.id} className="grid gap-x-4 border-b border-rule py-2 sm:grid-cols-[1fr_auto]">
            <div>
              <Link
                prefetch={false}
                href={`/nonconformances/${state.entry.id}`}
                className="inline-block min-h-6 font-label text-lead font-semibold text-chalk underline underline-offset-4"
              >
                {state.withdrawn ? <del>{body.title}</del> : body.title}
              </Link>
              <p className="text-pencil">
                {[body.where.text, body.extent].filter(Boolean).join('. ')}
                {body.neededBy &&
                  `. Needed by ${dayAndTime(body.neededBy, viewer.timeZone)}, ${timeAway(body.neededBy, viewer.now)}`}
              </p>
              {state.disposition && (
                <p>
                  {decisionWords[state.disposition.body.decision]}: {state.disposition.body.reason}
                </p>
              )}
              <JudgedDetails about={body.title} judged={judgedNonconformance(state)} />
            </div>
            {state.withdrawn ? (
              <span className="font-label font-semibold text-pencil">withdrawn</span>
            ) : (
              <NonconformanceStand status={state.status} />
            )}
          </li>
        );
      })}
    </ul>
  );
}
