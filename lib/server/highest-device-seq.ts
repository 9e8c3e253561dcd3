import { z } from 'zod';

const numbered = z.object({ deviceSeq: z.number().int().nonnegative() });

/** The highest number that a device gave to an entry of this batch; 0 when none can be read. */
export function highestDeviceSeq(entries: readonly unknown[]): number {
  return entries.reduce<number>((highest, entry) => {
    const parsed = numbered.safeParse(entry);
    return parsed.success ? Math.max(highest, parsed.data.deviceSeq) : highest;
  }, 0);
}
