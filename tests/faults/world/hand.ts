import type { RunningDevice } from '@/lib/device/create-device';
import type { OnPhone } from './check-history';
import { FaultyLine } from './faulty-line';
import { Phone, until, type Clock, type Line } from './phone';

/** One person's phone with its tabs, and the line that it is on. */
export interface Hand {
  phone: Phone;
  line: FaultyLine;
  tabs: RunningDevice[];
}

/**
 * A phone that was online once, and from now on is at the mercy of its line.
 * @param pourId a pour to keep on it, where it does not keep it by itself
 */
export async function hand(
  straight: Line,
  random: () => number,
  clock: Clock,
  pourId?: string,
): Promise<Hand> {
  const line = new FaultyLine(straight, random, clock);
  const phone = new Phone(clock, line.line, random);
  line.calm = true;
  const tab = await phone.tab();
  if (pourId) await tab.keepPour(pourId);
  await tab.syncNow();
  line.calm = false;
  return { phone, line, tabs: [tab] };
}

/** The line is good again, waits are over, and everybody sends what they have. */
export async function allCalm(hands: readonly Hand[], clock: Clock): Promise<void> {
  for (const one of hands) one.line.calm = true;
  clock.advance(20 * 60_000);
  for (const one of hands) {
    await one.line.deliverLate();
    for (let turn = 0; turn < 3; turn += 1) for (const tab of one.tabs) await tab.syncNow();
  }
}

/** What a tab shows as not sent, as its own export says it. */
export async function exported(
  tab: Pick<RunningDevice, 'exportUnsent'>,
): Promise<{ entries: { id: string }[]; refused: { id: string; sentence: string }[] }> {
  const file = JSON.parse(await (await tab.exportUnsent()).text()) as {
    entries: { id: string }[];
    refused: { envelope: { id: string }; sentence: string }[];
  };
  const refused = file.refused.map(({ envelope, sentence }) => ({ id: envelope.id, sentence }));
  return { entries: file.entries, refused };
}

/** What a phone shows as not sent. */
export async function onPhone(one: Hand): Promise<OnPhone> {
  const [tab] = one.tabs;
  if (!tab) throw new Error('no tab is open');
  const { entries, refused } = await exported(tab);
  return { name: one.phone.name, waiting: entries.map(({ id }) => id), refused };
}

/** The ids of a pour's entries as a phone that was never there before gets them. */
export async function fetchedAfresh(line: Line, clock: Clock, pourId: string): Promise<string[]> {
  const phone = new Phone(clock, line);
  const tab = await phone.tab();
  await tab.keepPour(pourId);
  await tab.syncNow();
  await until(() => Boolean(tab.pour(pourId)?.sheet), 'the pour is open');
  const entries = tab.pour(pourId)?.sheet?.entries ?? [];
  await phone.kill();
  return entries.filter((entry) => entry.pourId === pourId).map((entry) => entry.id);
}
