import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { fullTime } from '@/components/office/project-time';
import { decisionRuleWords } from '@/components/office/state-words';
import { Caution } from '@/components/office/caution';
import { PrintButton } from '@/components/office/print-button';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { TitleBlock } from '@/components/ui/title-block';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { roles, roleWords } from '@/lib/inspection/roles';
import { publicRelease, type PublicRelease } from '@/lib/server/public-release';

export const metadata: Metadata = { title: 'Release', robots: { index: false, follow: false } };

/** Whether a release stands, for anybody who holds its address: scope, validity as of now, digest and chain. */
export default async function ReleasedPage({ params }: { params: Promise<{ token: string }> }) {
  const now = new Date().toISOString();
  const page = await publicRelease((await params).token, now);
  if (!page) notFound();
  const { chain } = page;
  const standing = standingOf(page, now);
  return (
    <main id="main" className="mx-auto grid max-w-3xl gap-6 px-4 py-8">
      <SheetFrame
        heading={`Release ${page.number}: ${standing.word}`}
        level={1}
        titleBlock={
          <TitleBlock
            cells={[
              { label: 'Project', value: [page.projectName, page.place].filter(Boolean).join(', '), grow: 2 },
              { label: 'Pour', value: page.pour.number },
              { label: 'Plan', value: `rev ${revisionLetter(page.body.planRevision)}` },
              { label: 'Release', value: `${page.number}`, figure: true },
              { label: 'State', value: standing.word, tone: standing.tone },
            ]}
          />
        }
      >
        <div className="grid gap-4">
          <p className="text-lead">{standing.sentence}</p>
          <dl className="grid gap-x-6 sm:grid-cols-[max-content_1fr] sm:gap-y-1.5">
            <Line label="For">
              {page.pour.title}, {page.pour.location}
            </Line>
            <Line label="Scope">
              {page.scopeMarks?.join(', ') ?? 'the whole pour'}
              {page.body.scope.limits && `. ${page.body.scope.limits}`}
            </Line>
            <Line label="Given">
              {fullTime(page.releasedAt, page.timeZone)} by {page.releasedByName}
            </Line>
            <Line label="Valid">
              until the start of placing, at the latest {fullTime(page.validUntil, page.timeZone)}
            </Line>
            <Line label="Signed by">
              {page.signers.map((signer) => (
                <span key={`${signer.name}-${signer.at}`} className="block">
                  {signer.name}, {roleName(signer.role)}
                  {signer.certification && `, ${signer.certification}`}
                  {signer.licence && `, licence ${signer.licence}`}, {fullTime(signer.at, page.timeZone)}
                </span>
              ))}
            </Line>
            <Line label="Drawings">{page.body.drawings.join(', ') || 'none named'}</Line>
            <Line label="Mix">{page.body.mix ?? 'not named'}</Line>
            <Line label="Rests on">
              {page.body.readings} readings at the points read, and the items checked
              {page.body.dispositionIds.length > 0 &&
                `; ${page.body.dispositionIds.length} ${page.body.dispositionIds.length === 1 ? 'decision' : 'decisions'} of the engineer`}
            </Line>
            <Line label="Decision rule">{decisionRuleWords(page.decisionRule)}</Line>
            {page.body.conditions.length > 0 && (
              <Line label="Conditions during placing">
                {page.body.conditions.map((condition) => (
                  <span key={condition} className="block">
                    {condition}
                  </span>
                ))}
              </Line>
            )}
          </dl>
          <Caution>
            At the points read and for the items checked. Formwork, shoring and the authority&rsquo;s own
            inspection are not covered unless signed for. This page does not say that a structure is safe.
          </Caution>
        </div>
      </SheetFrame>
      <SheetFrame heading="The record behind it" aside={<PrintButton />}>
        <div className="grid gap-3">
          <p className={chain.intact ? '' : 'font-semibold text-hold'}>
            {chain.intact
              ? `Chain checked now: ${chain.entries} entries of this pour, each following from the one before, unbroken.`
              : `The chain is broken. ${chain.problem ?? ''}`}
          </p>
          <dl className="grid gap-x-6 sm:grid-cols-[max-content_1fr] sm:gap-y-1.5">
            <Line label="Digest of the sheet">
              <Hash>{page.body.sheetDigest}</Hash>
            </Line>
            <Line label="Head when given">
              no. {page.body.headSeq} <Hash>{page.body.headHash ?? 'none'}</Hash>
            </Line>
            <Line label="The release itself">
              no. {page.seq} <Hash>{page.entryHash}</Hash>
            </Line>
            <Line label="Head now">
              no. {chain.headSeq} <Hash>{chain.headHash ?? 'none'}</Hash>
            </Line>
            <Line label="Looked at">{fullTime(now, page.timeZone)}</Line>
          </dl>
          <p className="text-label text-pencil">
            A printed head lets anybody show later that nothing was taken out: the record must still lead
            through it.
          </p>
        </div>
      </SheetFrame>
    </main>
  );
}

const roleName = (name: string): string => {
  const known = roles.find((role) => role === name);
  return known ? roleWords[known].toLowerCase() : name;
};

/** Void, over, used, or standing: judged now, by the time of this request. */
function standingOf(
  page: PublicRelease,
  now: string,
): {
  word: string;
  tone: 'met' | 'hold' | 'plain';
  sentence: string;
} {
  const at = (iso: string) => fullTime(iso, page.timeZone);
  if (page.voided) {
    return {
      word: 'void',
      tone: 'hold',
      sentence: `Void since ${at(page.voided.at)}: ${page.voided.reason} It does not permit placing.`,
    };
  }
  if (!page.stands) {
    return {
      word: 'validity is over',
      tone: 'hold',
      sentence: `Its validity ended ${at(page.validUntil)}, before placing began. It does not permit placing.`,
    };
  }
  return page.placedAt
    ? {
        word: 'placing began under it',
        tone: 'plain',
        sentence: `It stood when placing began, ${at(page.placedAt)}.`,
      }
    : { word: 'stands', tone: 'met', sentence: `It stands as of ${at(now)}.` };
}

function Line({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <>
      <dt className="font-label font-medium text-pencil max-sm:text-label">{label}</dt>
      <dd className="min-w-0 max-sm:pb-1.5">{children}</dd>
    </>
  );
}

const Hash = ({ children }: { children: string }) => (
  <span className="font-figure text-label break-all">{children}</span>
);
