/** Joins class names and leaves out what is false, null or empty. */
export function classNames(...names: (string | false | null | undefined)[]): string {
  return names.filter(Boolean).join(' ');
}
