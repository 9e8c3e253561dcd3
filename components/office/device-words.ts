const browsers: [RegExp, string][] = [
  [/Edg\//, 'Edge'],
  [/Firefox\//, 'Firefox'],
  [/Chrom(e|ium)\//, 'Chrome'],
  [/Safari\//, 'Safari'],
];
const systems: [RegExp, string][] = [
  [/iPhone/, 'iPhone'],
  [/iPad/, 'iPad'],
  [/Android/, 'Android'],
  [/Windows/, 'Windows'],
  [/Mac OS X/, 'Mac'],
  [/Linux/, 'Linux'],
];

const nameIn = (list: [RegExp, string][], text: string): string | undefined =>
  list.find(([pattern]) => pattern.test(text))?.[1];

/** A browser's own description, in the words a person would use: "Chrome on Android". */
export function deviceWords(userAgent: string): string {
  const browser = nameIn(browsers, userAgent);
  const system = nameIn(systems, userAgent);
  if (browser && system) return `${browser} on ${system}`;
  return browser ?? system ?? 'A device that does not say what it is';
}
