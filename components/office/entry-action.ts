import type { EntryType } from '@/lib/inspection/entry';
import type { SelectOption } from '@/components/ui/select';

/** One field of a small form that records an entry. Every value is text while it is typed; `many` is a list of ids. */
export type ActionField =
  | { kind: 'text' | 'long' | 'password'; name: string; label: string; hint?: string; optional?: boolean }
  | { kind: 'time'; name: string; label: string; hint?: string; optional?: boolean }
  | {
      kind: 'select';
      name: string;
      label: string;
      hint?: string;
      options: SelectOption[];
      placeholder?: string;
    }
  | { kind: 'many'; name: string; label: string; hint?: string; options: SelectOption[] };

export type ActionValues = Record<string, string | string[]>;

/** A thing that a person may record from the office: its words, its fields, and the body that they make. */
export interface EntryAction {
  type: EntryType;
  /** On the button. */
  label: string;
  title: string;
  /** What follows from it, above the fields. */
  says?: string;
  submit: string;
  fields: ActionField[];
  start?: ActionValues;
  /** The body as it stands, valid or not: the shared schema judges it. */
  toBody: (values: ActionValues) => unknown;
  /** The field that a path of the schema belongs to, where the names differ. */
  fieldOf?: Record<string, string>;
}

/** The text of a field, without blanks around it. */
export const textIn = (values: ActionValues, name: string): string => {
  const value = values[name];
  return typeof value === 'string' ? value.trim() : '';
};

/** The ids ticked in a field of several. */
export const idsIn = (values: ActionValues, name: string): string[] => {
  const value = values[name];
  return Array.isArray(value) ? value : value ? [value] : [];
};
