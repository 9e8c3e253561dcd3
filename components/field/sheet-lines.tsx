'use client';

import { MarkIcon } from '@/components/drawings/mark';
import { checkGroupWords } from '@/lib/inspection/holds-work';
import { mayRecord } from '@/lib/inspection/entry-access';
import { placesMeasured } from '@/lib/inspection/judge-measurements';
import { checkGroups } from '@/lib/inspection/plan';
import type { FaceState, MarkKind } from '@/lib/inspection/sheet-types';
import { fixList } from '@/lib/inspection/fix-list';
import { fieldPaths } from './field-routes';
import type { OpenSheet } from './open-sheet';
import { SheetLine, SheetLines } from './sheet-line';
import { nonconformanceWords } from './state-tone';
import { readingsToConfirm } from './to-confirm';
import { walkProgress } from './walk-order';

/** Checks by group, with what is open and what is not met. */
export function CheckLines({ open }: { open: OpenSheet }) {
  const { checks, pourId } = open.sheet;
  const groups = checkGroups.filter((group) => checks.some((check) => check.item.group === group));
  if (groups.length === 0) return null;
  const left = checks.filter((check) => check.governing === null).length;
  return (
    <SheetLines heading="Checks" aside={left === 0 ? 'all answered' : `${left} of ${checks.length} open`}>
      {groups.map((group) => {
        const own = checks.filter((check) => check.item.group === group);
        const openCount = own.filter((check) => check.governing === null).length;
        const failed = own.filter(
          (check) => check.governing?.body.answer === 'not-met' && !check.acceptedBy,
        ).length;
        const tone = failed > 0 ? 'hold' : openCount > 0 ? 'plain' : 'met';
        return (
          <SheetLine
            key={group}
            href={fieldPaths.checks(pourId, group)}
            tone={tone}
            title={checkGroupWords[group]}
            count={
              failed > 0
                ? `${failed} not met${openCount > 0 ? `, ${openCount} open` : ''}`
                : openCount > 0
                  ? `${openCount} of ${own.length} open`
                  : `${own.length} answered`
            }
          />
        );
      })}
    </SheetLines>
  );
}

const worstFirst: MarkKind[] = [
  'not-met-low',
  'not-met-high',
  'not-verified',
  'unread',
  'met-flagged',
  'met',
];

function faceStanding(state: FaceState): { mark: MarkKind; words: string } {
  const all = [...state.points, ...state.spots];
  const mark = worstFirst.find((kind) => all.some((point) => point.mark === kind)) ?? 'unread';
  const failed = all.filter((point) => point.mark.startsWith('not-met')).length;
  const { read, total, left } = walkProgress(state.points);
  const parts = [
    failed > 0 ? `${failed} not met` : '',
    left > 0 ? `${read} of ${total}` : `all ${total} read`,
  ].filter(Boolean);
  return { mark, words: parts.join(' · ') };
}

/** Faces element by element, with points read and what is not met. */
export function FaceLines({ open }: { open: OpenSheet }) {
  const { plan, faces, pourId } = open.sheet;
  const toConfirm = readingsToConfirm(open).reduce((count, face) => count + face.readings.length, 0);
  return (
    <SheetLines heading="Cover" aside="points read">
      {toConfirm > 0 && (
        <SheetLine
          href={fieldPaths.confirm(pourId)}
          tone="watch"
          title="Read by you, typed by others"
          detail="They count once you confirm them"
          count={`${toConfirm} to confirm`}
        />
      )}
      {plan.elements.flatMap((element) =>
        element.faces.map((face) => {
          const state = faces.find((one) => one.faceId === face.id);
          const { mark, words } = state
            ? faceStanding(state)
            : { mark: 'unread' as const, words: 'no points' };
          return (
            <SheetLine
              key={face.id}
              href={fieldPaths.face(pourId, face.id)}
              mark={<MarkIcon kind={mark} title={true} />}
              tone={mark.startsWith('not-met') ? 'hold' : 'plain'}
              title={`${element.mark}, ${face.name}`}
              detail={element.location}
              count={words}
            />
          );
        }),
      )}
    </SheetLines>
  );
}

/** What the plan asks to be measured, with places done. */
export function MeasurementLines({ open }: { open: OpenSheet }) {
  const { measurements, plan, pourId } = open.sheet;
  if (measurements.length === 0) return null;
  return (
    <SheetLines heading="Measurements" aside="places done">
      {measurements.map((state) => {
        const done = placesMeasured(state);
        const failed = state.governing.filter(
          (place) => place.verdict === 'not-met' && !place.acceptedBy,
        ).length;
        return (
          <SheetLine
            key={state.item.id}
            href={fieldPaths.measurements(pourId, state.item.id)}
            tone={failed > 0 ? 'hold' : done < state.item.required ? 'plain' : 'met'}
            title={state.item.title}
            detail={plan.elements.find((element) => element.id === state.item.elementId)?.mark}
            count={`${failed > 0 ? `${failed} not met · ` : ''}${Math.min(done, state.item.required)} of ${state.item.required}`}
          />
        );
      })}
    </SheetLines>
  );
}

/** Nonconformances that are on record, and the way to raise one. */
export function NonconformanceLines({ open }: { open: OpenSheet }) {
  const { nonconformances, pourId } = open.sheet;
  const standing = nonconformances.filter((state) => !state.withdrawn);
  const mayRaise = mayRecord('nonconformance', open.project.role);
  if (standing.length === 0 && !mayRaise) return null;
  return (
    <SheetLines heading="Nonconformances" aside={standing.length === 0 ? 'none raised' : undefined}>
      {standing.map((state) => {
        const { word, tone } = nonconformanceWords[state.status];
        return (
          <SheetLine
            key={state.entry.id}
            href={fieldPaths.nonconformanceShown(pourId, state.entry.id)}
            tone={tone}
            title={state.entry.body.title}
            detail={state.entry.body.where.text}
            count={word}
          />
        );
      })}
      {mayRaise && (
        <SheetLine href={fieldPaths.nonconformance(pourId)} title="Raise a nonconformance" tone="info" />
      )}
    </SheetLines>
  );
}

/** Photos, site events, instruments, last walk, signatures. */
export function SiteLines({ open }: { open: OpenSheet }) {
  const { sheet, holds } = open;
  const { pourId } = sheet;
  const photosWaiting = sheet.photos.filter((photo) => !photo.stored && !photo.refused).length;
  const refused = sheet.photos.filter((photo) => photo.refused && !photo.stored).length;
  const suspect = sheet.instruments.filter((one) => one.suspect.some((window) => window.to === null)).length;
  const toFix = fixList(sheet, holds).length;
  const unsigned = (['inspector', 'superintendent'] as const).filter(
    (as) => !sheet.signatures.some((state) => state.stands && state.entry.body.as === as),
  );
  return (
    <SheetLines heading="The rest of the sheet">
      <SheetLine
        href={fieldPaths.holds(pourId)}
        tone={holds.length > 0 ? 'hold' : 'met'}
        title="Holds"
        count={holds.length === 0 ? 'none' : String(holds.length)}
      />
      <SheetLine
        href={fieldPaths.fixList(pourId)}
        tone={toFix > 0 ? 'hold' : 'plain'}
        title="Fix list"
        detail="For the crew, in English and Spanish"
        count={toFix === 0 ? 'empty' : String(toFix)}
      />
      <SheetLine
        href={fieldPaths.photos(pourId)}
        tone={refused > 0 ? 'hold' : photosWaiting > 0 ? 'watch' : 'plain'}
        title="Photos"
        count={`${sheet.photos.length}${refused > 0 ? `, ${refused} refused` : photosWaiting > 0 ? `, ${photosWaiting} not stored yet` : ''}`}
      />
      <SheetLine
        href={fieldPaths.instruments(pourId)}
        tone={suspect > 0 ? 'hold' : 'plain'}
        title="Instruments"
        detail="Block checks at start, middle and end"
        count={suspect > 0 ? `${suspect} suspect` : String(sheet.instruments.length)}
      />
      <SheetLine
        href={fieldPaths.events(pourId)}
        title="On site"
        detail="Rain, changes, placing, notes, holds by hand"
        count={sheet.siteEvents.length > 0 ? String(sheet.siteEvents.length) : undefined}
      />
      {sheet.plan.lastWalk && (
        <SheetLine
          href={fieldPaths.lastWalk(pourId)}
          tone={sheet.lastWalk ? 'met' : 'plain'}
          title="Last walk"
          count={sheet.lastWalk ? 'done' : 'to do'}
        />
      )}
      <SheetLine
        href={fieldPaths.sign(pourId)}
        tone={unsigned.length === 0 ? 'met' : 'plain'}
        title="Sign"
        count={unsigned.length === 0 ? 'both signed' : unsigned.length === 1 ? 'one signed' : 'nobody signed'}
      />
    </SheetLines>
  );
}
