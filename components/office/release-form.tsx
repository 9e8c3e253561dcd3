'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { z } from 'zod';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { LeaveLink } from '@/components/ui/leave-link';
import { LinkButton } from '@/components/ui/link-button';
import { Notice } from '@/components/ui/notice';
import { Textarea } from '@/components/ui/textarea';
import { holdsInScope } from '@/lib/inspection/holds';
import { roleWords } from '@/lib/inspection/roles';
import { inScope } from '@/lib/inspection/scope';
import type { Hold } from '@/lib/inspection/sheet-types';
import { holdHref } from './hold-place';
import { postJson, type Posted } from './post-json';
import { ProblemNotice } from './problem-notice';

const given = z.object({ number: z.number(), token: z.string() });
const heldDetail = z.object({
  holds: z.array(z.object({ id: z.string(), title: z.string(), where: z.string(), need: z.string() })),
});

/** Asks for the release of a scope: shows what stands in it, or the button; then the number, or the holds. */
export function ReleaseForm({
  pourId,
  elements,
  holds,
  standing,
  endsEarly,
}: {
  pourId: string;
  elements: { id: string; name: string }[];
  holds: Hold[];
  /** Releases that stand now, by number and scope: no second one is given for what they cover. */
  standing: { number: number; elementIds: string[] | null }[];
  /** Where a release given now would end before placing is planned to start: that, in words. */
  endsEarly: string | null;
}) {
  const router = useRouter();
  const [chosen, setChosen] = useState<string[] | null>(null);
  const [limits, setLimits] = useState('');
  const [reason, setReason] = useState('');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<Extract<Posted, { ok: false }> | null>(null);
  const [release, setRelease] = useState<z.infer<typeof given> | null>(null);

  const partial = chosen !== null && chosen.length < elements.length;
  const scope = { elementIds: partial ? chosen : null, limits: partial ? limits.trim() : '' };
  const against = chosen?.length === 0 ? [] : holdsInScope(holds, scope);
  const already = standing.find((one) => inScope(one.elementIds, scope));
  const incomplete = chosen?.length === 0 || (partial && limits.trim() === '');

  const ask = async () => {
    setBusy(true);
    setFailure(null);
    const answer = await postJson(`/api/pours/${pourId}/release`, { scope, reason: reason.trim() });
    setBusy(false);
    if (answer.ok) {
      const parsed = given.safeParse(answer.data);
      setRelease(parsed.success ? parsed.data : null);
    } else setFailure(answer);
    router.refresh();
  };

  if (release) {
    return (
      <Notice
        tone="met"
        title={`Release ${release.number} is given`}
        actions={
          <>
            <LinkButton href={`/released/${release.token}`} variant="primary">
              Its page
            </LinkButton>
            <LinkButton href={`/pours/${pourId}`}>The pour</LinkButton>
          </>
        }
      >
        <p>
          Its page can be handed to anybody: it says whether the release stands. At the points read and for
          the items checked; formwork, shoring and the authority&rsquo;s own inspection are not covered unless
          signed for.
        </p>
      </Notice>
    );
  }
  const refused = failure?.code === 'held' ? heldDetail.safeParse(failure.detail) : null;
  return (
    <div className="grid gap-4">
      {failure && (
        <ProblemNotice
          failure={failure}
          title={failure.code === 'held' ? 'Refused' : 'No release was given'}
        />
      )}
      {refused?.success && (
        <ul aria-label="Holds that stood against it">
          {refused.data.holds.map((hold) => (
            <li key={hold.id} className="border-b border-rule py-1">
              <span className="font-label font-semibold">{hold.title}</span>, {hold.where}. {hold.need}
            </li>
          ))}
        </ul>
      )}
      {elements.length > 1 && (
        <fieldset className="grid gap-1">
          <legend className="font-label text-label font-semibold">Scope</legend>
          <Checkbox
            type="radio"
            name="scope"
            label="The whole pour"
            checked={chosen === null}
            onChange={() => setChosen(null)}
          />
          <Checkbox
            type="radio"
            name="scope"
            label="Named elements, to a bulkhead or limit"
            checked={chosen !== null}
            onChange={() => setChosen([])}
          />
          {chosen !== null && (
            <div className="grid gap-2 border-l-[3px] border-ink pl-3">
              {elements.map((element) => (
                <Checkbox
                  key={element.id}
                  label={element.name}
                  checked={chosen.includes(element.id)}
                  onChange={(event) =>
                    setChosen(
                      event.target.checked
                        ? [...chosen, element.id]
                        : chosen.filter((id) => id !== element.id),
                    )
                  }
                />
              ))}
              {partial && (
                <Textarea
                  label="Where it ends"
                  hint="Bulkheads and limits, in words that the crew can find on site"
                  rows={2}
                  maxLength={300}
                  value={limits}
                  onChange={(event) => setLimits(event.target.value)}
                />
              )}
            </div>
          )}
        </fieldset>
      )}
      {incomplete ? (
        <p className="text-pencil">Tick the elements and say where the release ends.</p>
      ) : already ? (
        <p>
          Release {already.number} stands for this scope already. A new one can be given once it is void or
          its validity is over.
        </p>
      ) : against.length === 0 ? (
        <div className="grid gap-2">
          <p>No hold stands in this scope, at the points read and for the items checked.</p>
          {endsEarly && (
            <Notice tone="watch" role="note">
              <p>{endsEarly}</p>
            </Notice>
          )}
          <div>
            <Button variant="primary" busy={busy} onClick={() => void ask()}>
              Give the release
            </Button>
          </div>
        </div>
      ) : (
        <>
          <div role="status">
            <h3 className="text-lead">
              {against.length} {against.length === 1 ? 'hold stands' : 'holds stand'} in this scope
            </h3>
            <ul>
              {against.map((hold) => (
                <li
                  key={hold.id}
                  className="grid gap-x-4 border-b border-rule py-1.5 sm:grid-cols-[1fr_auto]"
                >
                  <span>
                    <LeaveLink
                      href={holdHref(pourId, hold.id)}
                      className="inline-block min-h-6 font-label font-semibold underline decoration-rule underline-offset-4 hover:text-chalk"
                    >
                      {hold.title}
                    </LeaveLink>
                    <span className="block text-label text-pencil">
                      {hold.where}. {hold.need}
                    </span>
                  </span>
                  <span className="font-label text-label font-medium">{roleWords[hold.clearedBy]}</span>
                </li>
              ))}
            </ul>
          </div>
          <details>
            <summary className="min-h-6 w-fit font-label font-semibold text-chalk">
              Ask all the same, for the record
            </summary>
            <div className="grid gap-3 pt-2">
              <p>It will be refused. The attempt goes on record with your name, the time and the reason.</p>
              <Textarea
                label="Reason"
                optional
                rows={2}
                maxLength={500}
                value={reason}
                onChange={(event) => setReason(event.target.value)}
              />
              <div>
                <Button variant="hold" busy={busy} onClick={() => void ask()}>
                  Ask for the release
                </Button>
              </div>
            </div>
          </details>
        </>
      )}
    </div>
  );
}
