import { textIn, type ActionField, type EntryAction } from './entry-action';

/** What one row of a list can be answered with: a hold, an entry, a query, a condition. */

const outcomeField: ActionField = {
  kind: 'select',
  name: 'outcome',
  label: 'Outcome',
  options: [
    { value: 'met', label: 'Met' },
    { value: 'not-met', label: 'Not met' },
  ],
  placeholder: 'Choose',
};

export const liftAction = (holdId: string): EntryAction => ({
  type: 'hold-lifted',
  label: 'Lift',
  title: 'Lift this hold',
  submit: 'Lift the hold',
  fields: [{ kind: 'long', name: 'reason', label: 'Why it may be lifted' }],
  toBody: (values) => ({ holdId, reason: textIn(values, 'reason') }),
});

export const queryAction = (entryId: string): EntryAction => ({
  type: 'query',
  label: 'Query',
  title: 'Query this entry',
  says: 'A query holds the pour until it is answered.',
  submit: 'Send the query',
  fields: [{ kind: 'long', name: 'text', label: 'What is not clear' }],
  toBody: (values) => ({ entryId, text: textIn(values, 'text') }),
});

export const answerQueryAction = (queryId: string): EntryAction => ({
  type: 'query-answered',
  label: 'Answer',
  title: 'Answer the query',
  submit: 'Record the answer',
  fields: [{ kind: 'long', name: 'text', label: 'Answer' }],
  toBody: (values) => ({ queryId, text: textIn(values, 'text') }),
});

export const conditionAction = (conditionId: string): EntryAction => ({
  type: 'condition-verified',
  label: 'Verify',
  title: 'Verify the condition',
  submit: 'Record it',
  fields: [outcomeField, { kind: 'long', name: 'text', label: 'What was seen', optional: true }],
  toBody: (values) => ({ conditionId, outcome: textIn(values, 'outcome'), text: textIn(values, 'text') }),
});

const WITHDRAW = 'withdraw';
const CORRECT = 'correct';

/** An entry of one's own as it stands, and the last amendment of it that one has seen. */
export interface AmendedEntry {
  id: string;
  sawAmendmentId: string | null;
  correctable: { key: string; body: Record<string, unknown> } | null;
}

/** Corrects the words of one's own entry, or withdraws it; what was first recorded stays, struck through. */
export const amendAction = (amended: AmendedEntry): EntryAction => ({
  type: 'amendment',
  label: amended.correctable ? 'Amend' : 'Withdraw',
  title: amended.correctable ? 'Amend or withdraw your entry' : 'Withdraw your entry',
  says: 'What you first recorded stays in the record, struck through, with your reason.',
  submit: 'Record it',
  fields: [
    ...(amended.correctable
      ? ([
          {
            kind: 'select',
            name: 'what',
            label: 'What',
            options: [
              { value: CORRECT, label: 'Correct the words' },
              { value: WITHDRAW, label: 'Withdraw the entry' },
            ],
          },
          {
            kind: 'long',
            name: 'words',
            label: 'How it should read',
            hint: 'Not used where it is withdrawn',
          },
        ] satisfies ActionField[])
      : []),
    { kind: 'long', name: 'reason', label: 'Why' },
  ],
  start: {
    what: amended.correctable ? CORRECT : WITHDRAW,
    words: amended.correctable ? String(amended.correctable.body[amended.correctable.key] ?? '') : '',
  },
  toBody: (values) => ({
    rootId: amended.id,
    sawAmendmentId: amended.sawAmendmentId,
    reason: textIn(values, 'reason'),
    replacement:
      amended.correctable && textIn(values, 'what') === CORRECT
        ? { ...amended.correctable.body, [amended.correctable.key]: textIn(values, 'words') }
        : null,
    photoId: null,
  }),
  fieldOf: { replacement: 'words' },
});
