import { DeviceError } from '@/lib/device/device-types';

/** Problems of a form by field path ("where.text"); the empty path is about the form as a whole. */
export type Problems = Readonly<Record<string, string>>;

/** What to tell a person when an entry could not be kept: by field where the device names fields. */
export function problemsOf(error: unknown): Problems {
  if (error instanceof DeviceError) {
    if (error.fields.length > 0)
      return Object.fromEntries(error.fields.map((field) => [field.path, field.message]));
    return { '': error.message };
  }
  return { '': 'This could not be kept on the device. What you entered is still here. Try again.' };
}
