/**
 * What is kept of a person's store outside of it, in a cookie: enough to tell an emptied store from a new one, and
 * which entries went with it.
 */
export interface HighWaterMark {
  storeId: string;
  deviceId: string;
  /** The highest deviceSeq ever made here. */
  made: number;
  /** How many entries had not been confirmed by the server, and which (as far as they fit). */
  unsent: number;
  unsentSeqs: number[];
  /** Photos whose entry the server has confirmed and whose bytes had not been sent. */
  unsentPhotos: number;
}

const MOST_CHARACTERS = 900;

/** 3,4,5,9 -> "3-5,9"; cut where it would not fit in a cookie. */
function rangesText(seqs: readonly number[]): string {
  const sorted = [...seqs].sort((a, b) => a - b);
  const parts: string[] = [];
  let length = 0;
  for (let index = 0; index < sorted.length;) {
    const first = sorted[index] ?? 0;
    let last = first;
    while (sorted[index + 1] === last + 1) {
      index += 1;
      last += 1;
    }
    index += 1;
    const part = first === last ? String(first) : `${first}-${last}`;
    length += part.length + 1;
    if (length > MOST_CHARACTERS) break;
    parts.push(part);
  }
  return parts.join(',');
}

function seqsOf(text: string): number[] {
  return text
    .split(',')
    .filter(Boolean)
    .flatMap((part) => {
      const [first, last = first] = part.split('-').map(Number);
      if (first === undefined || last === undefined || !(first <= last) || last - first > 1_000_000)
        return [];
      return Array.from({ length: last - first + 1 }, (_, step) => first + step);
    });
}

/** The mark as cookie text: digits, letters and `. , -` only. */
export function writeMark(mark: HighWaterMark): string {
  const { storeId, deviceId, made, unsent, unsentSeqs, unsentPhotos } = mark;
  return [storeId, deviceId, made, unsent, rangesText(unsentSeqs), unsentPhotos].join('.');
}

/** The mark of a cookie's text; null when it is none. */
export function readMark(text: string | null): HighWaterMark | null {
  const [storeId, deviceId, made, unsent, ranges, photos] = (text ?? '').split('.');
  if (!storeId || !deviceId || !/^\d+$/.test(made ?? '') || !/^\d+$/.test(unsent ?? '')) return null;
  return {
    storeId,
    deviceId,
    made: Number(made),
    unsent: Number(unsent),
    unsentSeqs: seqsOf(ranges ?? ''),
    // Earlier versions did not count them.
    unsentPhotos: /^\d+$/.test(photos ?? '') ? Number(photos) : 0,
  };
}

const PREFIX = 'cw-mark-';
export const markName = (personId: string): string => `${PREFIX}${personId}`;

/** Whose marks these cookies hold, by person id. */
export const personsMarked = (names: readonly string[]): string[] =>
  names.filter((name) => name.startsWith(PREFIX)).map((name) => name.slice(PREFIX.length));
