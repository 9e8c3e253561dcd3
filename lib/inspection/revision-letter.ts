/** Revision letters as drawings use them: 1 -> A, 26 -> Z, 27 -> AA. */
export function revisionLetter(revision: number): string {
  let letters = '';
  for (let rest = revision; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  }
  return letters;
}
