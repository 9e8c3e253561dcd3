import type { DeviceEnvironment } from '../device-environment';
import type { DevicePerson, PersonOnDevice, PinAnswer } from '../device-types';
import type { PersonHere, SettingsStore, WaitingHere } from '../store/settings-store';
import { MOST_FAILURES, pinProblem, pinStanding, type PinRecord } from './pin-guard';
import { hashPin, pinMatches } from './pin-hash';

type PeopleEnvironment = Pick<DeviceEnvironment, 'now' | 'crypto' | 'tabNote'>;

export const nothingWaits: WaitingHere = { entries: 0, photos: 0, oldestAt: null, pours: {} };
const noCrypto = 'A PIN cannot be kept under this address: it is not a secure one (https).';
const wrongSentence = 'That is not the PIN.';

/**
 * Who has signed in on this device, who is holding it, and the PIN of each: what all people of the device share. It is
 * written before it counts, so that neither a reload nor a second tab gets around it.
 */
export class PeopleHere {
  #people: PersonHere[] = [];
  #pins: Record<string, PinRecord> = {};
  #lastId: string | null = null;
  #locked = false;
  /** The session that this tab has noted. */
  #session = '';

  constructor(
    private readonly env: PeopleEnvironment,
    private readonly settings: SettingsStore,
  ) {}

  /** Reads what the store knows; again once another tab has changed it. */
  async read(): Promise<void> {
    this.#people = (await this.settings.read('people')) ?? [];
    this.#pins = (await this.settings.read('pins')) ?? {};
    const lastId = await this.settings.read('personId');
    this.#lastId = lastId ?? null;
    this.#locked = (await this.settings.read('locked')) ?? lastId === null;
  }

  /** Has this person had their work open here before? */
  knows(personId: string): boolean {
    return this.#people.some((one) => one.id === personId);
  }

  /** Who opened their work last and has not handed the device over; null while it is locked. */
  get holder(): DevicePerson | null {
    return this.#locked ? null : this.#find(this.#lastId);
  }

  /**
   * Whose work opens without asking: this very tab had it open, or nobody else has ever signed in here and no PIN was
   * chosen.
   */
  get opensByItself(): DevicePerson | null {
    const holder = this.holder;
    if (!holder) return null;
    const alone = this.#people.length === 1 && !this.#pins[holder.id];
    return alone || this.env.tabNote.read() === holder.id ? holder : null;
  }

  hasPin(personId: string): boolean {
    return this.#pins[personId] !== undefined;
  }

  /** Everybody who has signed in here, latest first, as the screens show them. */
  list(): PersonOnDevice[] {
    const now = this.env.now();
    return this.#people.map(({ id, name, waiting }) => ({
      id,
      name,
      waiting: waitingOf(waiting),
      pin: pinStanding(this.#pins[id], now),
    }));
  }

  #find(personId: string | null): DevicePerson | null {
    const found = this.#people.find((one) => one.id === personId);
    return found ? { id: found.id, name: found.name, email: found.email } : null;
  }

  /** This person holds the device from now on. */
  async opened(person: DevicePerson): Promise<void> {
    const { id, name, email } = person;
    this.#people = await this.settings.change('people', (before = []) => {
      const waiting = before.find((one) => one.id === id)?.waiting ?? nothingWaits;
      return [{ id, name, email, waiting }, ...before.filter((one) => one.id !== id)];
    });
    await this.settings.write('personId', id);
    await this.settings.write('locked', false);
    this.#lastId = id;
    this.#locked = false;
    this.env.tabNote.write(id);
  }

  /** Nobody holds the device: whose work opens next is asked. */
  async lock(): Promise<void> {
    await this.settings.write('locked', true);
    this.#locked = true;
    this.env.tabNote.write('');
  }

  async noteWaiting(personId: string, waiting: WaitingHere): Promise<void> {
    const known = this.#people.find((one) => one.id === personId);
    if (!known || JSON.stringify(known.waiting) === JSON.stringify(waiting)) return;
    this.#people = await this.settings.change('people', (before = []) =>
      before.map((one) => (one.id === personId ? { ...one, waiting } : one)),
    );
  }

  /**
   * Tells a session that was begun with a password since this device last heard of one. It opens that person's work,
   * and the wrong tries at their PIN are forgotten.
   * @param since when the session began; null where the server does not say
   */
  async isNewSession(personId: string, since: string | null): Promise<boolean> {
    const heard = `${personId} ${since ?? ''}`;
    if (this.#session === heard) return false;
    let isNew = false;
    await this.settings.change('session', (before) => {
      const now = { personId, since: since ?? '' };
      isNew = before?.personId !== now.personId || before.since !== now.since;
      return now;
    });
    this.#session = heard;
    if (isNew && this.#pins[personId]) await this.#noteFailures(personId, () => 0);
    return isNew;
  }

  /**
   * Tries a PIN. The try is counted before it is judged, so that a tab killed in the middle has not tried for nothing.
   */
  async tryPin(personId: string, pin: string): Promise<{ answer: PinAnswer; person: DevicePerson | null }> {
    await this.read();
    const answer = await this.#judge(personId, pin);
    return { answer, person: answer.ok ? this.#find(personId) : null };
  }

  async #judge(personId: string, pin: string): Promise<PinAnswer> {
    const person = this.#find(personId);
    const record = this.#pins[personId];
    if (!person || !record)
      return refusal('no-pin', 'No PIN was chosen here. Sign in with the network and your password.');
    const before = pinStanding(record, this.env.now());
    if (before.state === 'closed') return refusal('closed', closedSentence(person.name));
    if (before.waitUntil !== null) {
      // A clock that was set back: the wait goes on from here, and ends.
      if (record.failedAt > this.env.now()) await this.#noteFailures(personId, (count) => count);
      return refusal('wait', 'Too many wrong tries. Wait until the keys are free again.', before.waitUntil);
    }
    if (!hasSubtle(this.env.crypto)) return refusal('no-pin', noCrypto);
    await this.#noteFailures(personId, (count) => count + 1);
    if (await pinMatches(this.env.crypto, pin, record)) {
      await this.#noteFailures(personId, () => 0);
      return { ok: true };
    }
    const after = pinStanding(this.#pins[personId], this.env.now());
    if (after.state === 'closed') return refusal('closed', closedSentence(person.name));
    const left = MOST_FAILURES - (this.#pins[personId]?.failures ?? 0);
    return refusal(
      'wrong',
      `${wrongSentence} ${left === 1 ? 'One try is' : `${left} tries are`} left, then it takes the network and the password.`,
      after.waitUntil,
    );
  }

  /**
   * Keeps a new PIN for this device.
   * @param current the PIN so far; null where none is needed, because the person has just signed in
   */
  async setPin(personId: string, pin: string, current: string | null): Promise<PinAnswer> {
    const problem = pinProblem(pin);
    if (problem) return refusal('unfit', problem);
    if (!hasSubtle(this.env.crypto)) return refusal('no-pin', noCrypto);
    if (current !== null && this.hasPin(personId)) {
      const { answer } = await this.tryPin(personId, current);
      if (!answer.ok) return answer;
    }
    const hash = await hashPin(this.env.crypto, pin);
    this.#pins = await this.settings.change('pins', (before = {}) => ({
      ...before,
      [personId]: { ...hash, failures: 0, failedAt: 0 },
    }));
    return { ok: true };
  }

  async #noteFailures(personId: string, next: (count: number) => number): Promise<void> {
    this.#pins = await this.settings.change('pins', (before = {}) => {
      const record = before[personId];
      if (!record) return before;
      const failures = next(record.failures);
      return { ...before, [personId]: { ...record, failures, failedAt: this.env.now() } };
    });
  }
}

const refusal = (
  reason: Exclude<PinAnswer, { ok: true }>['reason'],
  sentence: string,
  waitUntil: number | null = null,
): Exclude<PinAnswer, { ok: true }> => ({ ok: false, reason, sentence, waitUntil });

const closedSentence = (name: string) =>
  `Too many wrong tries. ${name} opens this again by signing in with the network and the password. What waits is kept.`;

/** Without a secure address a browser has no `subtle`, whatever its type says. */
const hasSubtle = (crypto: Partial<Pick<Crypto, 'subtle'>>): boolean => crypto.subtle !== undefined;

const waitingOf = (waiting: PersonHere['waiting']): WaitingHere =>
  typeof waiting === 'number' ? { ...nothingWaits, entries: waiting } : waiting;
