import { MarkIcon } from '@/components/drawings/mark';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { roleWords } from '@/lib/inspection/roles';
import { ConfirmSignature } from './confirm-signature';
import { entryWords, personName, type WordContext } from './entry-words';
import type { OfficeViewer } from './office-viewer';
import { fullTime } from './project-time';
import { SignatureStrokes } from './signature-strokes';

/** Who has signed what, whether it counts, and what set it aside. */
export function SignaturesPanel({
  sheet,
  context,
  viewer,
}: {
  sheet: Sheet;
  context: WordContext;
  viewer: OfficeViewer;
}) {
  if (sheet.signatures.length === 0) {
    return (
      <p className="text-pencil">
        Nobody has signed yet. The inspector and the superintendent sign, two persons.
      </p>
    );
  }
  return (
    <ul>
      {sheet.signatures.map((state) => {
        const name = personName(state.entry.authorId, viewer.people);
        const waits = state.confirmed === null && state.setAsideBy === null;
        return (
          <li
            key={state.entry.id}
            className="grid gap-x-4 gap-y-1 border-b border-rule py-2 sm:grid-cols-[1fr_auto]"
          >
            <div>
              <p className="flex items-center gap-1.5 font-label font-semibold">
                <MarkIcon kind={state.stands ? 'met' : waits ? 'met-flagged' : 'not-verified'} />
                {roleWords[state.entry.body.as]}: {name}
              </p>
              <p>{state.entry.body.words}</p>
              <p className="text-label text-pencil">
                {fullTime(state.entry.recordedAt, viewer.timeZone)}.{' '}
                {state.stands
                  ? 'Confirmed with the password; it stands.'
                  : waits
                    ? 'Not confirmed yet: it does not count.'
                    : state.setAsideBy
                      ? `Set aside by a later entry: ${entryWords(state.setAsideBy, context).title}`
                      : 'It does not stand.'}
              </p>
            </div>
            <div className="grid justify-items-end gap-1">
              <SignatureStrokes strokes={state.entry.body.strokes} of={name} />
              {waits && state.entry.authorId === viewer.personId && (
                <ConfirmSignature signatureId={state.entry.id} words={state.entry.body.words} />
              )}
            </div>
          </li>
        );
      })}
    </ul>
  );
}
