import type { DeviceIndex } from '@/lib/inspection/wire';
import type { DeviceEnvironment } from '../device-environment';
import type { SyncPhase } from '../device-types';
import type { PersonWork } from '../person-work';
import { askServer, type Trouble } from './ask-server';
import { backOff } from './back-off';
import { pullStreams } from './pull-streams';
import { pushOutbox } from './push-outbox';

/** Readings that follow each other quickly go in one batch. */
const GATHER_MS = 400;
const POLL_MS = 45_000;
/** A photo that was sent is looked at by the server within seconds: what it found is asked for soon, then less often. */
const PHOTO_POLL_MS = 3_000;
const OTHER_TAB_SENDS_MS = 3_000;
/** The server is asked who is signed in, and for which pours there are, no more often than this. */
const INDEX_MS = 30_000;

export interface LaneState {
  phase: SyncPhase;
  message: string | null;
  /** Whose session the server has, where that is another person. */
  signedInAs: string | null;
}

interface LaneHost {
  work(): PersonWork | null;
  /** The state changed: tell the screens. */
  changed(): void;
  /** Whose session the server has. */
  heardSession(index: DeviceIndex): void;
  /** A round went through: photos may go now. */
  wentThrough(): void;
}

/** Sends and fetches for the person whose work is open: one round at a time, in one tab at a time. */
export class SyncLane {
  state: LaneState = { phase: 'idle', message: null, signedInAs: null };
  /** Whose session the server was last heard to have; null when that is not known. */
  #sessionOf: string | null = null;
  #running: Promise<void> | null = null;
  #again = false;
  #failures = 0;
  /** Rounds since the last one that found no photo sent and not heard of. */
  #photoPolls = 0;
  /** The server asked to wait. A timer ends it: the device's clock may be set meanwhile. */
  #askedToWait = false;
  #stopWaiting: (() => void) | null = null;
  #stopTimer: (() => void) | null = null;
  #indexAt = Number.NEGATIVE_INFINITY;
  #stopped = false;

  constructor(
    private readonly env: DeviceEnvironment,
    private readonly host: LaneHost,
  ) {}

  stop(): void {
    this.#stopped = true;
    this.#stopTimer?.();
    this.#stopWaiting?.();
  }

  /** Another person's work was opened: nothing learned about the last one's session holds. */
  personChanged(): void {
    this.#indexAt = Number.NEGATIVE_INFINITY;
    this.#sessionOf = null;
    this.#failures = 0;
    this.#set('idle', null);
  }

  /** The server has just said that the person whose work is open is the one signed in. */
  heardWhoIsHere(personId: string): void {
    this.#indexAt = this.env.now();
    this.#sessionOf = personId;
  }

  /** Is the server's session this person's own, as heard of lately? Nothing is sent in another's. (SPEC 11) */
  async ownSession(work: PersonWork): Promise<boolean> {
    if (this.#sessionOf !== work.person.id) return false;
    if (!this.#indexIsOld()) return true;
    return (await this.#askWhoIsSignedIn(work, () => !work.closed)) === null;
  }

  /** Something was recorded: send it soon. A back-off under way is not cut short. */
  soon(): void {
    if (this.#failures > 0) return;
    this.#in(GATHER_MS);
  }

  /** Something says that it is worth trying at once (network back, tab in sight). */
  wake(): void {
    if (this.#askedToWait) return;
    void this.run();
  }

  /** Runs a round that begins after this call, and resolves when it has ended, however it ended. */
  run(): Promise<void> {
    if (this.#stopped) return Promise.resolve();
    if (this.#running) {
      this.#again = true;
      return this.#running;
    }
    this.#stopTimer?.();
    this.#running = this.#rounds().finally(() => {
      this.#running = null;
    });
    return this.#running;
  }

  /** A clock that was set back makes it old too, and not new until the clock has caught up. */
  #indexIsOld(): boolean {
    return Math.abs(this.env.now() - this.#indexAt) > INDEX_MS;
  }

  #waitAsAsked(milliseconds: number | null): void {
    this.#stopWaiting?.();
    this.#askedToWait = milliseconds !== null;
    if (milliseconds === null) return;
    this.#stopWaiting = this.env.after(milliseconds, () => (this.#askedToWait = false));
  }

  #in(milliseconds: number): void {
    if (this.#stopped) return;
    this.#stopTimer?.();
    this.#stopTimer = this.env.after(milliseconds, () => void this.run());
  }

  #set(phase: SyncPhase, message: string | null, signedInAs: string | null = null): void {
    const { state } = this;
    if (state.phase === phase && state.message === message && state.signedInAs === signedInAs) return;
    this.state = { phase, message, signedInAs };
    this.host.changed();
  }

  async #rounds(): Promise<void> {
    do {
      this.#again = false;
      const work = this.host.work();
      if (!work) return;
      const ended = await this.env.ifFree('cagewright-sync', () => this.#round(work)).catch(storeTrouble);
      if (this.#stopped || this.host.work() !== work) continue;
      if (ended === 'taken') {
        // It tells us what it sends and fetches, unless it is closed in the middle of it.
        this.#in(OTHER_TAB_SENDS_MS * (1 + this.env.random()));
        return;
      }
      if (ended === 'stopped') continue;
      await this.#ended(work, ended);
      if (ended.kind === 'trouble') return;
    } while (this.#again);
  }

  async #ended(work: PersonWork, ended: LaneTrouble | Through): Promise<void> {
    if (ended.kind === 'trouble') {
      this.#failures += 1;
      const wait = backOff(this.#failures, this.env.random(), ended.retryAfterMs);
      if (ended.retryAfterMs !== null) this.#waitAsAsked(ended.retryAfterMs);
      if (ended.phase === 'sign-in-needed') this.#sessionOf = null;
      this.#set(ended.phase, `${ended.sentence} ${keptWords(work)}`.trim(), ended.signedInAs ?? null);
      this.#in(wait);
      return;
    }
    this.#failures = 0;
    this.#waitAsAsked(null);
    await work.setLastSuccess(new Date(this.env.now()).toISOString()).catch(() => undefined);
    this.#set('idle', ended.problem && `${ended.problem} ${keptWords(work)}`.trim());
    this.host.changed();
    this.host.wentThrough();
    this.#poll(work);
  }

  #poll(work: PersonWork): void {
    const unheard = [...work.photos.values()].some((photo) => photo.progress === 'sent');
    this.#photoPolls = unheard ? this.#photoPolls + 1 : 0;
    const wait = unheard ? Math.min(POLL_MS, PHOTO_POLL_MS * 2 ** (this.#photoPolls - 1)) : POLL_MS;
    if (this.env.inSight()) this.#in(wait * (1 + this.env.random() / 4));
  }

  async #round(work: PersonWork): Promise<LaneTrouble | Through | 'stopped'> {
    const goOn = () => !this.#stopped && this.host.work() === work && !work.closed;
    if (this.#indexIsOld() || this.state.phase !== 'idle') {
      const stranger = await this.#askWhoIsSignedIn(work, goOn);
      if (stranger) return stranger;
    }
    // A restored server makes the pull put entries back into the outbox: one more turn offers them.
    for (let turn = 0; ; turn += 1) {
      if (work.outbox.size > 0) this.#set('sending', null);
      const pushed = await pushOutbox(this.env, work, goOn);
      if (pushed.kind === 'stopped') return 'stopped';
      if (pushed.kind === 'trouble') return pushed;
      if (pushed.kind === 'other-person') {
        this.#indexAt = Number.NEGATIVE_INFINITY;
        return otherPerson(work, null);
      }
      if (this.state.phase !== 'idle') this.#set('fetching', null);
      const pulled = await pullStreams(this.env, work, goOn);
      if (pulled.kind === 'stopped') return 'stopped';
      if (pulled.kind === 'trouble') return pulled;
      if (!pulled.offeredAgain || turn >= 2)
        return { kind: 'through', problem: pushed.problem ?? pulled.problem };
    }
  }

  /** An outbox is sent only in its author's own session: ask first whose session this is. (SPEC 11) */
  async #askWhoIsSignedIn(work: PersonWork, goOn: () => boolean): Promise<LaneTrouble | 'stopped' | null> {
    const answer = await askServer(this.env, { method: 'GET', path: '/api/sync/index' }, 'deviceIndex');
    if (!goOn()) return 'stopped';
    if (answer.kind === 'trouble') return answer;
    this.host.heardSession(answer.data);
    if (answer.data.person.id !== work.person.id) {
      this.#sessionOf = null;
      return otherPerson(work, answer.data.person.name);
    }
    this.heardWhoIsHere(work.person.id);
    await work.setClockOffset(answer.clockOffsetMs);
    await work.setIndex(answer.data);
    return null;
  }
}

interface Through {
  kind: 'through';
  /** What could not be done for reasons of its own, while the rest went through. */
  problem: string | null;
}

/** A trouble with the line, or with whose session it is. */
interface LaneTrouble extends Trouble {
  signedInAs?: string;
}

function otherPerson(work: PersonWork, name: string | null): LaneTrouble {
  const { name: own } = work.person;
  return {
    kind: 'trouble',
    phase: 'sign-in-needed',
    aboutRequest: false,
    status: null,
    sentence: `${name ?? 'Somebody else'} is signed in on this device now. What ${own} recorded is sent when ${own} signs in.`,
    retryAfterMs: null,
    signedInAs: name ?? 'Somebody else',
  };
}

function storeTrouble(): Trouble {
  return {
    kind: 'trouble',
    phase: 'server-trouble',
    aboutRequest: false,
    status: null,
    sentence: 'This device could not write what the server answered. It is asked again.',
    retryAfterMs: null,
  };
}

/** "12 entries are kept on this device and sent later." Nothing where nothing waits. */
function keptWords(work: PersonWork): string {
  const count = work.outbox.size;
  if (count === 0) return '';
  return count === 1
    ? '1 entry is kept on this device and is sent later.'
    : `${count} entries are kept on this device and are sent later.`;
}
