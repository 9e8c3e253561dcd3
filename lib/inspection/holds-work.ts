import { conflictHold } from './conflict-hold';
import type { CheckGroup } from './plan';
import { markOf } from './holds-measurements';
import type { CheckState, Hold, PhotoState, Sheet } from './sheet-types';

/** What the groups of a checklist are called on every screen and document. */
export const checkGroupWords: Record<CheckGroup, string> = {
  documents: 'Documents and drawings',
  formwork: 'Formwork',
  steel: 'Steel',
  placing: 'Placing of bars',
  supports: 'Supports and ties',
  cover: 'Cover',
  laps: 'Laps and couplers',
  embedded: 'Embedded items',
  cleanliness: 'Cleanliness',
  access: 'Access and weather',
  'sign-off': 'Sign-off by other trades',
};

/** Holds of the checklist: not met each by itself, open ones by group, hold and witness points by themselves, evidence. */
export function checkHolds(sheet: Sheet): Hold[] {
  const open = new Map<string, CheckState[]>();
  const found: Hold[] = [];
  for (const state of sheet.checks) {
    const { item } = state;
    const place = {
      elementId: item.elementId,
      faceId: null,
      where: `${markOf(sheet, item.elementId)}, ${checkGroupWords[item.group].toLowerCase()}`,
    };
    const subjects = [{ kind: 'check' as const, id: item.id }];
    if (state.conflict) found.push(conflictHold(`check:${item.id}`, item.question, place, subjects));
    if (state.governing === null) {
      if (item.attendance === 'none') {
        const key = `${item.group}/${item.elementId ?? ''}/${item.closedBy}`;
        open.set(key, [...(open.get(key) ?? []), state]);
      } else {
        found.push({
          id: `attendance:${item.id}`,
          kind: 'attendance',
          title: `${item.attendance === 'hold-point' ? 'Hold point' : 'Witness point'} not attended: ${item.question}`,
          detail: item.basis,
          ...place,
          since: null,
          clearedBy: item.closedBy,
          need: 'Attend it and record the answer.',
          subjects,
        });
      }
      continue;
    }
    if (state.governing.body.answer === 'not-met' && state.acceptedBy === null) {
      found.push({
        id: `${state.correctedSince ? 'recheck-awaited:check' : 'check-not-met'}:${item.id}`,
        kind: state.correctedSince ? 'recheck-awaited' : 'check-not-met',
        title: state.correctedSince ? `Check again: ${item.question}` : `Not met: ${item.question}`,
        detail: state.correctedSince?.body.text ?? state.governing.body.note ?? item.basis,
        ...place,
        since: state.governing.recordedAt,
        clearedBy: state.correctedSince ? 'inspector' : 'superintendent',
        need: state.correctedSince
          ? 'Look at the correction and answer again.'
          : 'Put it right and report the correction, then the inspector checks again.',
        subjects,
      });
    }
    if (item.evidence === 'photo' && state.governing.body.answer === 'met') {
      const evidence = evidenceHold(sheet, state, place);
      if (evidence) found.push(evidence);
    }
  }
  for (const [key, states] of open) {
    const first = states[0];
    if (!first) continue;
    found.push({
      id: `check-open:${key}`,
      kind: 'check-open',
      title: `${checkGroupWords[first.item.group]}: ${states.length === 1 ? 'one check' : `${states.length} checks`} open`,
      detail: states.map((state) => state.item.question).join(' · '),
      elementId: first.item.elementId,
      faceId: null,
      where: markOf(sheet, first.item.elementId),
      since: null,
      clearedBy: first.item.closedBy,
      need: 'Look and answer each of them.',
      subjects: states.map((state) => ({ kind: 'check', id: state.item.id })),
    });
  }
  return found;
}

function evidenceHold(
  sheet: Sheet,
  state: CheckState,
  place: Pick<Hold, 'elementId' | 'faceId' | 'where'>,
): Hold | null {
  const photos = state.photoIds
    .map((id) => sheet.photos.find((photo) => photo.entry.body.photoId === id))
    .filter((photo): photo is PhotoState => photo !== undefined);
  if (photos.some((photo) => photo.stored !== null)) return null;
  const refused = photos.find((photo) => photo.refused !== null);
  return {
    id: `photo-missing:check:${state.item.id}`,
    kind: 'photo-missing',
    title:
      photos.length === 0
        ? `Photo missing: ${state.item.question}`
        : `Photo not stored yet: ${state.item.question}`,
    detail: refused
      ? `It was refused: ${refused.refused?.body.problem ?? ''}`
      : 'It counts once its bytes are stored and checked.',
    ...place,
    since: state.governing?.recordedAt ?? null,
    clearedBy: 'inspector',
    need:
      photos.length === 0 || refused
        ? 'Take a photo that shows it.'
        : 'Connect the device that took it, so that it can be sent.',
    subjects: [{ kind: 'check', id: state.item.id }],
  };
}
