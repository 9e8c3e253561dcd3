import { textIn, type ActionValues, type EntryAction } from './entry-action';
import { instantFromField, localFieldText } from './project-time';

const instrumentKinds = [
  { value: 'depth-gauge', label: 'Depth gauge' },
  { value: 'tape', label: 'Tape' },
  { value: 'cover-meter', label: 'Cover meter' },
  { value: 'calliper', label: 'Calliper' },
  { value: 'block', label: 'Block' },
];

/** A number as typed; text that is none stays what it is, for the schema to refuse. */
const numberOf = (values: ActionValues, name: string): unknown => {
  const text = textIn(values, name).replace(',', '.');
  const value = Number(text);
  return text === '' || !Number.isFinite(value) ? null : value;
};

const instantOf = (values: ActionValues, name: string, timeZone: string): string =>
  instantFromField(textIn(values, name), timeZone) ?? textIn(values, name);

/** A drawing has come in; pours that were planned to an earlier revision of it are held. */
export const drawingReceivedAction = (now: string, timeZone: string): EntryAction => ({
  type: 'drawing-received',
  label: 'Receive a drawing',
  title: 'Receive a drawing',
  says: 'Pours that were planned to another revision of it are held until the engineer has revised their plans.',
  submit: 'Record it',
  fields: [
    { kind: 'text', name: 'number', label: 'Number' },
    { kind: 'text', name: 'revision', label: 'Revision' },
    { kind: 'time', name: 'at', label: 'Received' },
  ],
  start: { at: localFieldText(now, timeZone) },
  toBody: (values) => ({
    number: textIn(values, 'number'),
    revision: textIn(values, 'revision'),
    at: instantOf(values, 'at', timeZone),
  }),
});

export const mixChangedAction = (mixes: readonly string[]): EntryAction => ({
  type: 'mix-changed',
  label: 'Change the mix',
  title: 'Change the mix',
  says: 'A release that rests on the mix that it replaces becomes void, and pours planned with that mix are held until their plans are revised.',
  submit: 'Record it',
  fields: [
    { kind: 'text', name: 'name', label: 'Mix', hint: 'As the plans will name it' },
    {
      kind: 'select',
      name: 'replaces',
      label: 'In place of',
      options: [
        { value: '', label: 'whatever is planned, in every pour' },
        ...mixes.map((name) => ({ value: name, label: name })),
      ],
    },
    { kind: 'long', name: 'text', label: 'Note', optional: true },
  ],
  toBody: (values) => ({
    pourId: null,
    name: textIn(values, 'name'),
    replaces: textIn(values, 'replaces'),
    text: textIn(values, 'text'),
  }),
});

/** An instrument as the register knows it. */
export interface ListedInstrument {
  id: string;
  name: string;
  kind: string;
  serial: string;
  calibrationDue: string | null;
  uncertaintyMm: number | null;
  inService: boolean;
}

/** Registers an instrument, or records what has changed of one. */
export const instrumentAction = (
  instrument: ListedInstrument | null,
  newId: string,
  timeZone: string,
): EntryAction => ({
  type: 'instrument-status',
  label: instrument ? 'Change' : 'Register an instrument',
  title: instrument ? `Change ${instrument.name}` : 'Register an instrument',
  says: 'Readings taken after its calibration is due, or with an unknown instrument, are not verified.',
  submit: 'Record it',
  fields: [
    { kind: 'text', name: 'name', label: 'Name', hint: 'As people call it on site' },
    { kind: 'select', name: 'kind', label: 'Kind', options: instrumentKinds, placeholder: 'Choose' },
    { kind: 'text', name: 'serial', label: 'Serial', optional: true },
    { kind: 'time', name: 'calibrationDue', label: 'Calibration due', optional: true },
    {
      kind: 'text',
      name: 'uncertaintyMm',
      label: 'Expanded uncertainty in mm (k = 2)',
      hint: 'From its certificate',
      optional: true,
    },
    {
      kind: 'select',
      name: 'inService',
      label: 'State',
      options: [
        { value: 'yes', label: 'In service' },
        { value: 'no', label: 'Out of service' },
      ],
    },
  ],
  start: instrument
    ? {
        name: instrument.name,
        kind: instrument.kind,
        serial: instrument.serial,
        calibrationDue: instrument.calibrationDue ? localFieldText(instrument.calibrationDue, timeZone) : '',
        uncertaintyMm: instrument.uncertaintyMm === null ? '' : String(instrument.uncertaintyMm),
        inService: instrument.inService ? 'yes' : 'no',
      }
    : { inService: 'yes' },
  toBody: (values) => ({
    instrumentId: instrument?.id ?? newId,
    name: textIn(values, 'name'),
    kind: textIn(values, 'kind'),
    serial: textIn(values, 'serial'),
    calibrationDue:
      textIn(values, 'calibrationDue') === '' ? null : instantOf(values, 'calibrationDue', timeZone),
    uncertaintyMm:
      textIn(values, 'uncertaintyMm') === '' ? null : (numberOf(values, 'uncertaintyMm') ?? Number.NaN),
    inService: textIn(values, 'inService') !== 'no',
  }),
});

/** A known block, read with the instrument: a failed check makes what was read since the last good one suspect. */
export const blockCheckAction = (
  instrument: ListedInstrument,
  now: string,
  timeZone: string,
): EntryAction => ({
  type: 'block-check',
  label: 'Block check',
  title: `Block check of ${instrument.name}`,
  says: 'A check that fails makes every reading measured since the last good one suspect, in every pour.',
  submit: 'Record it',
  fields: [
    {
      kind: 'select',
      name: 'when',
      label: 'When in the shift',
      options: [
        { value: 'start', label: 'Start' },
        { value: 'middle', label: 'Middle' },
        { value: 'end', label: 'End' },
      ],
    },
    { kind: 'time', name: 'at', label: 'Time' },
    { kind: 'text', name: 'blockMm', label: 'Block in mm' },
    { kind: 'text', name: 'readMm', label: 'Read in mm' },
    { kind: 'text', name: 'toleranceMm', label: 'Tolerance in mm' },
  ],
  start: { when: 'start', at: localFieldText(now, timeZone) },
  toBody: (values) => ({
    instrumentId: instrument.id,
    at: instantOf(values, 'at', timeZone),
    when: textIn(values, 'when'),
    blockMm: numberOf(values, 'blockMm'),
    readMm: numberOf(values, 'readMm'),
    toleranceMm: numberOf(values, 'toleranceMm'),
  }),
});
