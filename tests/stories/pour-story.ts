import { checklistTemplate } from '@/lib/inspection/checklist-templates';
import { ENTRY_VERSION, type BodyOf, type EntryType } from '@/lib/inspection/entry';
import type { RecordedEntry } from '@/lib/inspection/facts';
import type { Plan } from '@/lib/inspection/plan';
import type { Role } from '@/lib/inspection/roles';

/** Ids that sort and read well in a failing test: a UUID of one repeated number. */
export const uuid = (group: number, number: number): string =>
  `${String(group).padStart(8, '0')}-0000-7000-8000-${String(number).padStart(12, '0')}`;

export const projectId = uuid(1, 1);
export const pourId = uuid(2, 1);
export const gauge = uuid(3, 1);
export const people = {
  inspector: uuid(4, 1),
  secondInspector: uuid(4, 2),
  superintendent: uuid(4, 3),
  engineer: uuid(4, 4),
  coordinator: uuid(4, 5),
} as const;
export type Person = keyof typeof people;
const roleOf: Record<Person, Role> = {
  inspector: 'inspector',
  secondInspector: 'inspector',
  superintendent: 'superintendent',
  engineer: 'engineer',
  coordinator: 'coordinator',
};

/** A quay deck bay with one face of five points, specified 50 mm and accepted from 38 mm, and a few checks. */
export function smallPlan(over: Partial<Plan> = {}): Plan {
  const checks = checklistTemplate('deck').items.filter((item) =>
    ['drawings-current', 'chairs-stand', 'debris'].includes(item.id),
  );
  return {
    schema: 1,
    pourId,
    revision: 1,
    issuedAt: '2026-11-30T08:00:00.000Z',
    authorId: people.engineer,
    reason: 'First issue',
    units: 'mm',
    basis: 'contract',
    decisionRule: { kind: 'simple' },
    validityHours: 24,
    rainLimitMm: 5,
    mix: { id: 'mix', name: 'Marine 40/20', aggregateMm: 20 },
    elements: [
      {
        id: 'deck',
        type: 'deck',
        mark: 'Quay deck, bay 3',
        location: 'grids C to D',
        level: '+2.40',
        thicknessMm: 300,
        drawing: { number: 'S-204', revision: '5' },
        faces: [
          {
            id: 'soffit',
            name: 'soffit',
            meeting: 'formed',
            soffit: true,
            exposure: 'tidal',
            widthMm: 7200,
            heightMm: 4000,
            openings: [],
            recesses: [],
            requirements: [
              {
                id: 'outer',
                steel: 'outermost bar B1',
                barDesignation: '16',
                barDiameterMm: 16,
                specifiedMm: 50,
                leastAcceptedMm: 38,
                mostAcceptedMm: null,
                codeMinimumMm: null,
                warnings: [],
                trail: [],
              },
            ],
            points: ['A1', 'A2', 'A3', 'B1', 'B2'].map((label, index) => ({
              id: `soffit.${label}`,
              label,
              kind: 'drawn' as const,
              xMm: 1000 + (index % 3) * 2400,
              yMm: index < 3 ? 1000 : 3000,
            })),
          },
        ],
        layers: [],
      },
    ],
    measurements: [],
    checklist: { template: 'Bridge or quay deck', version: 1, items: checks },
    lastWalk: true,
    ...over,
  };
}

interface Speaker {
  deviceId: string;
  deviceSeq: number;
  seenSeq: number;
}

/**
 * Writes a record as people would: each speaks from a device of their own, hears what was recorded when they listen,
 * and the server gives out the order.
 */
export class PourStory {
  readonly recorded: RecordedEntry[] = [];
  private readonly speakers = new Map<Person, Speaker>();
  private made = 0;
  private minute = 0;

  constructor(private readonly planRevision = 1) {
    this.say('coordinator', 'instrument-status', {
      instrumentId: gauge,
      name: 'DG-2',
      kind: 'depth-gauge',
      serial: 'Q-118',
      calibrationDue: '2027-06-01T00:00:00.000Z',
      uncertaintyMm: 1,
      inService: true,
    });
  }

  private speaker(person: Person): Speaker {
    const known = this.speakers.get(person);
    if (known) return known;
    const made = { deviceId: uuid(5, Object.keys(people).indexOf(person) + 1), deviceSeq: 0, seenSeq: 0 };
    this.speakers.set(person, made);
    return made;
  }

  get head(): number {
    return this.recorded.reduce((head, entry) => Math.max(head, entry.seq ?? 0), 0);
  }

  get now(): string {
    return new Date(Date.parse('2026-12-01T06:00:00.000Z') + this.minute * 60_000).toISOString();
  }

  pass(minutes: number): this {
    this.minute += minutes;
    return this;
  }

  /** This person's device has fetched everything up to now. */
  hears(...who: Person[]): this {
    for (const person of who) this.speaker(person).seenSeq = this.head;
    return this;
  }

  /** Records an entry without having fetched anything since this person last did. */
  say<T extends EntryType>(person: Person, type: T, body: BodyOf<T>): string {
    const speaker = this.speaker(person);
    this.made += 1;
    this.minute += 1;
    speaker.deviceSeq += 1;
    const id = uuid(9, this.made);
    const projectWide = [
      'instrument-status',
      'block-check',
      'drawing-received',
      'mix-changed',
      'rules-changed',
    ].includes(type);
    this.recorded.push({
      id,
      projectId,
      pourId: projectWide ? null : pourId,
      type,
      v: ENTRY_VERSION,
      body: body as RecordedEntry['body'],
      planRevision: this.planRevision,
      authorId: people[person],
      authorRole: roleOf[person],
      deviceId: speaker.deviceId,
      deviceSeq: speaker.deviceSeq,
      recordedAt: this.now,
      clockOffsetMs: 0,
      seenSeq: speaker.seenSeq,
      seq: this.head + 1,
      receivedAt: this.now,
      hash: '0'.repeat(64),
      prevHash: null,
    });
    return id;
  }

  /** Fetches first, then records: the ordinary case of somebody online. */
  tells<T extends EntryType>(person: Person, type: T, body: BodyOf<T>): string {
    this.hears(person);
    return this.say(person, type, body);
  }

  readingBody(label: string, mm: number, over: Partial<BodyOf<'reading'>> = {}): BodyOf<'reading'> {
    return {
      faceId: 'soffit',
      requirementId: 'outer',
      steel: 'outermost bar B1',
      pointId: `soffit.${label}`,
      spot: null,
      value: { text: String(mm), unit: 'mm', mm },
      goNoGo: null,
      instrumentId: gauge,
      phase: 'before',
      measuredAt: this.now,
      asFoundBar: null,
      measurer: null,
      ...over,
    };
  }

  reads(
    label: string,
    mm: number,
    person: Person = 'inspector',
    over: Partial<BodyOf<'reading'>> = {},
  ): string {
    return this.say(person, 'reading', this.readingBody(label, mm, over));
  }

  /** All points read and met, all checks answered with their photo stored, walked: nothing left but the signatures. */
  inspected(): this {
    this.hears('inspector');
    for (const label of ['A1', 'A2', 'A3', 'B1', 'B2']) this.reads(label, 46);
    return this.checked();
  }

  checked(): this {
    for (const checkId of ['drawings-current', 'chairs-stand', 'debris'])
      this.say('inspector', 'answer', { checkId, answer: 'met' });
    const sha256 = 'a'.repeat(64);
    const photoId = uuid(8, this.made);
    this.say('inspector', 'photo', {
      photoId,
      sha256,
      bytes: 1000,
      contentType: 'image/jpeg',
      takenAt: this.now,
      about: { kind: 'check', id: 'chairs-stand' },
      shot: 'close',
      caption: '',
    });
    this.tells('coordinator', 'photo-stored', {
      photoId,
      key: 'photos/aa',
      sha256,
      bytes: 1000,
      contentType: 'image/jpeg',
      widthPx: 8,
      heightPx: 8,
    });
    this.tells('inspector', 'last-walk', {
      outcome: 'met',
      places: 'North runway and the edge of bay 3',
      elementIds: null,
    });
    return this;
  }

  signs(
    person: 'inspector' | 'secondInspector' | 'superintendent',
    as: 'inspector' | 'superintendent' = person === 'superintendent' ? 'superintendent' : 'inspector',
  ): string {
    const id = this.tells(person, 'signature', {
      as,
      elementIds: null,
      words: 'I have inspected this pour.',
      strokes: [],
      sheetDigest: 'b'.repeat(64),
    });
    this.tells(person, 'signature-confirmed', { signatureId: id });
    return id;
  }

  signed(): this {
    this.signs('inspector');
    this.signs('superintendent');
    return this;
  }
}
