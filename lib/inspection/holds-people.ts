import { revisionLetter } from './revision-letter';
import { roleWords } from './roles';
import type { Hold, NonconformanceState, Sheet, SignatureState } from './sheet-types';

const nowhere = { elementId: null, faceId: null } as const;

function hold(part: Partial<Hold> & Pick<Hold, 'id' | 'kind' | 'title' | 'clearedBy' | 'need'>): Hold {
  return { ...nowhere, detail: '', where: 'Whole pour', since: null, subjects: [], ...part };
}

/** Holds that wait for a decision, an answer or an act of a person. */
export function decisionHolds(sheet: Sheet, now: string): Hold[] {
  return [
    ...(sheet.unknown.length > 0 ? [updateNeeded(sheet)] : []),
    ...planHolds(sheet),
    ...sheet.nonconformances.flatMap((state) => nonconformanceHold(sheet, state)),
    ...conditionHolds(sheet, now),
    ...sheet.queries
      .filter((query) => query.answer === null)
      .map(({ entry }) =>
        hold({
          id: `query-open:${entry.id}`,
          kind: 'query-open',
          title: `Query: ${entry.body.text}`,
          since: entry.recordedAt,
          clearedBy: entry.authorRole === 'engineer' ? 'inspector' : 'engineer',
          need: 'Answer the query.',
          subjects: [{ kind: 'entry', id: entry.id }],
        }),
      ),
    ...sheet.manualHolds
      .filter((state) => state.lifted === null)
      .map(({ entry }) =>
        hold({
          id: `manual:${entry.id}`,
          kind: 'manual',
          title: entry.body.title,
          detail: entry.body.onBehalfOf
            ? `On behalf of ${entry.body.onBehalfOf}.`
            : `Placed by the ${roleWords[entry.authorRole].toLowerCase()}.`,
          elementId: entry.body.where.elementId,
          faceId: entry.body.where.faceId,
          where: entry.body.where.text || 'Whole pour',
          since: entry.recordedAt,
          clearedBy: entry.body.clearedBy,
          need: entry.body.need,
          subjects: [{ kind: 'entry', id: entry.id }],
        }),
      ),
    ...sheet.verbalInstructions
      .filter(({ entry, confirmed }) => !entry.body.signedBy && confirmed === null)
      .map(({ entry }) =>
        hold({
          id: `verbal-instruction:${entry.id}`,
          kind: 'verbal-instruction',
          title: `Verbal instruction not signed: ${entry.body.text}`,
          detail: `Given by ${entry.body.from}.`,
          since: entry.recordedAt,
          clearedBy: 'engineer',
          need: 'Confirm it in writing and lift the hold, naming the paper that is signed.',
          subjects: [{ kind: 'entry', id: entry.id }],
        }),
      ),
  ];
}

function updateNeeded(sheet: Sheet): Hold {
  return hold({
    id: 'update-needed',
    kind: 'update-needed',
    title: 'This version cannot read the whole record',
    detail: `${sheet.unknown.length} ${sheet.unknown.length === 1 ? 'entry was' : 'entries were'} written by a newer version.`,
    since: sheet.unknown[0]?.recordedAt ?? null,
    clearedBy: 'inspector',
    need: 'Update the application, then look again.',
  });
}

function planHolds(sheet: Sheet): Hold[] {
  const bare = sheet.plan.elements.flatMap((element) =>
    element.faces.filter((face) => face.points.length === 0).map((face) => ({ element, face })),
  );
  return [
    ...bare.map(({ element, face }) =>
      hold({
        id: `plan-incomplete:${face.id}`,
        kind: 'plan-incomplete',
        title: 'The plan has no reading points for this face',
        elementId: element.id,
        faceId: face.id,
        where: `${element.mark}, ${face.name}`,
        since: sheet.plan.issuedAt,
        clearedBy: 'engineer',
        need: 'Revise the plan.',
        subjects: [{ kind: 'face', id: face.id }],
      }),
    ),
    ...sheet.supersededDrawings.map((one) =>
      hold({
        id: `superseded-drawing:${one.elementId}`,
        kind: 'superseded-drawing',
        title: `Plan made to drawing ${one.number} rev ${one.planned}; rev ${one.received.body.revision} was received`,
        elementId: one.elementId,
        where: sheet.plan.elements.find((element) => element.id === one.elementId)?.mark ?? 'Whole pour',
        since: one.received.recordedAt,
        clearedBy: 'engineer',
        need: 'Compare the revisions and issue a plan revision to the drawing in force.',
        subjects: [{ kind: 'element', id: one.elementId }],
      }),
    ),
    ...(sheet.mixChange ? [mixHold(sheet, sheet.mixChange)] : []),
  ];
}

const mixHold = (sheet: Sheet, change: NonNullable<Sheet['mixChange']>): Hold =>
  hold({
    id: `mix-changed:${change.id}`,
    kind: 'mix-changed',
    title: `Mix changed to ${change.body.name}; the plan names ${sheet.plan.mix?.name ?? 'none'}`,
    detail: change.body.text,
    elementId: null,
    where: 'Whole pour',
    since: change.recordedAt,
    clearedBy: 'engineer',
    need: 'Look at what its aggregate and strength change, and issue a plan revision that names the mix to be placed.',
    subjects: [{ kind: 'pour', id: sheet.pourId }],
  });

function nonconformanceHold(sheet: Sheet, state: NonconformanceState): Hold[] {
  const { body } = state.entry;
  const place = {
    elementId: body.where.elementId,
    faceId: body.where.faceId,
    where: body.where.text || 'Whole pour',
  };
  const subjects: Hold['subjects'] = [{ kind: 'nonconformance', id: state.entry.id }];
  const base = { ...place, since: state.entry.recordedAt, subjects };
  const decision = state.disposition?.body.decision;
  switch (state.status) {
    case 'closed':
    case 'accepted':
      return [];
    case 'decision-asked':
      return [
        hold({
          ...base,
          id: `disposition-awaited:${state.entry.id}`,
          kind: 'disposition-awaited',
          title: `Decision asked: ${body.title}`,
          detail: body.proposal ? `Proposed: ${body.proposal}` : '',
          clearedBy: 'engineer',
          need: body.neededBy
            ? 'Decide by the time asked for, or rework it to the drawings.'
            : 'Decide, or rework it to the drawings.',
        }),
      ];
    case 'corrected':
      return [
        hold({
          ...base,
          id: `recheck-awaited:nonconformance:${state.entry.id}`,
          kind: 'recheck-awaited',
          title: `Recheck: ${body.title}`,
          detail: state.corrections.at(-1)?.body.text ?? '',
          clearedBy: 'inspector',
          need: 'Look at the correction and record the recheck.',
        }),
      ];
    case 'rejected':
    case 'open':
      return [
        hold({
          ...base,
          id: `nonconformance-open:${state.entry.id}`,
          kind: 'nonconformance-open',
          title: decision
            ? `${decision === 'reject' ? 'Rejected' : decision === 'repair' ? 'Repair' : 'Rework'}: ${body.title}`
            : `Nonconformance: ${body.title}`,
          detail: state.disposition?.body.reason ?? body.extent,
          clearedBy: 'superintendent',
          need: decision
            ? 'Carry out the decision and report the correction; then the inspector rechecks.'
            : 'Put it right and report the correction; then the inspector rechecks.',
        }),
      ];
  }
}

function conditionHolds(sheet: Sheet, now: string): Hold[] {
  return sheet.conditions
    .filter(
      ({ condition, verified }) => condition.stage === 'before-pour' && verified?.body.outcome !== 'met',
    )
    .map(({ condition, disposition, verified }) => {
      const about = sheet.nonconformances.find(
        (state) => state.entry.id === disposition.body.nonconformanceId,
      );
      const late = condition.dueAt !== null && condition.dueAt < now;
      return hold({
        id: `condition-not-verified:${condition.id}`,
        kind: 'condition-not-verified',
        title: `Condition of the decision: ${condition.text}`,
        detail: `${verified ? 'Found not met. ' : ''}${late ? 'Past its due time. ' : ''}Met when: ${condition.criterion}`,
        elementId: about?.entry.body.where.elementId ?? null,
        faceId: about?.entry.body.where.faceId ?? null,
        where: about?.entry.body.where.text || 'Whole pour',
        since: disposition.recordedAt,
        clearedBy: 'inspector',
        need: 'Verify it on site and record it.',
        subjects: [{ kind: 'nonconformance', id: disposition.body.nonconformanceId }],
      });
    });
}

/** The last walk and the two signatures: asked for per element, since a partial release needs only those of its scope. */
export function signatureHolds(sheet: Sheet): Hold[] {
  const found: Hold[] = [];
  if (sheet.plan.lastWalk && sheet.lastWalk === null) {
    found.push(
      hold({
        id: 'last-walk-missing',
        kind: 'last-walk-missing',
        title: 'Last walk not done',
        detail: 'Traffic routes, openings, and around reworked places, right before the release.',
        clearedBy: 'inspector',
        need: 'Walk it and record what was found.',
      }),
    );
  }
  const signers = new Set<string>();
  for (const as of ['inspector', 'superintendent'] as const) {
    const own = sheet.signatures.filter((state) => state.entry.body.as === as);
    const uncovered = sheet.plan.elements.filter(
      (element) =>
        !own.some(
          (state) =>
            state.stands &&
            !signers.has(state.entry.authorId) &&
            (state.entry.body.elementIds === null || state.entry.body.elementIds.includes(element.id)),
        ),
    );
    for (const state of own) if (state.stands) signers.add(state.entry.authorId);
    if (uncovered.length === 0) continue;
    const all = uncovered.length === sheet.plan.elements.length;
    const last = own.at(-1);
    for (const element of all ? [null] : uncovered) found.push(signatureHold(sheet, as, element, last));
  }
  return found;
}

function signatureHold(
  sheet: Sheet,
  as: 'inspector' | 'superintendent',
  element: { id: string; mark: string } | null,
  last: SignatureState | undefined,
): Hold {
  const revised = last?.setAsideBy?.type === 'plan-issued';
  const detail = !last
    ? ''
    : revised
      ? `Plan rev ${revisionLetter(sheet.plan.revision)} was issued since.`
      : last.setAsideBy
        ? 'The earlier signature was set aside: something was recorded since that it did not cover.'
        : last.confirmed
          ? 'One person cannot sign for both roles.'
          : 'Signed, and not yet confirmed with the password.';
  return hold({
    id: `${revised ? 'plan-revised' : 'signature-missing'}:${as}:${element?.id ?? 'all'}`,
    kind: revised ? 'plan-revised' : 'signature-missing',
    title: `${roleWords[as]}’s signature ${last?.setAsideBy ? 'set aside' : last && !last.confirmed ? 'not confirmed' : 'missing'}`,
    detail,
    elementId: element?.id ?? null,
    where: element?.mark ?? 'Whole pour',
    clearedBy: as,
    need:
      last && !last.confirmed && !last.setAsideBy
        ? 'Confirm the signature with the password, online.'
        : 'Read what is signed, and sign.',
  });
}
