import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  judgeReading,
  type CoverLimits,
  type InstrumentAtReading,
  type ReadingRule,
  type ReadingToJudge,
  type Verdict,
} from '@/lib/concrete/judge-reading';
import { parseLength, withUnit } from '@/lib/concrete/length';

const good: InstrumentAtReading = { uncertaintyMm: 1, status: 'good' };
const simple: ReadingRule = { kind: 'simple' };
const guarded: ReadingRule = { kind: 'guarded' };
const atLeast38: CoverLimits = { leastAcceptedMm: 38, mostAcceptedMm: null };
const band: CoverLimits = { leastAcceptedMm: 38, mostAcceptedMm: 50 };
const judge = (
  reading: ReadingToJudge,
  requirement: CoverLimits | null = atLeast38,
  instrument = good,
  rule: ReadingRule = simple,
) => judgeReading(reading, requirement, instrument, rule, 'mm');

describe('limits', () => {
  test.each<[number, CoverLimits, Verdict, 'low' | 'high' | null]>([
    [38, atLeast38, 'met', null],
    [37.999_998, atLeast38, 'not-met', 'low'],
    [38 - 5e-7, atLeast38, 'met', null],
    [300, atLeast38, 'met', null],
    [50, band, 'met', null],
    [50.000_002, band, 'not-met', 'high'],
    [0, atLeast38, 'not-met', 'low'],
  ])('%f mm', (mm, requirement, verdict, side) => {
    expect(judge({ mm }, requirement)).toMatchObject({ verdict, side });
  });

  test('2/3 in is not 11/16 in nor 5/8 in: nothing snaps to the tape', () => {
    const thirds: CoverLimits = { leastAcceptedMm: (25.4 * 2) / 3, mostAcceptedMm: null };
    const inches = (sixteenths: number) => ({ mm: (sixteenths * 25.4) / 16 });
    expect(judgeReading(inches(11), thirds, good, simple, 'in').verdict).toBe('met');
    const low = judgeReading(inches(10), thirds, good, simple, 'in');
    expect(low).toMatchObject({ verdict: 'not-met', side: 'low' });
    expect(low.reason).toBe('5/8 in is 1/24 in less than the least accepted 2/3 in.');
  });

  test('margin is the distance to the nearer limit', () => {
    expect(judge({ mm: 40 }, band).marginMm).toBeCloseTo(2, 9);
    expect(judge({ mm: 47 }, band).marginMm).toBeCloseTo(3, 9);
    expect(judge({ mm: 35 }, band).marginMm).toBeCloseTo(-3, 9);
    expect(judge({ mm: 52 }, band).marginMm).toBeCloseTo(-2, 9);
  });

  test('says by how much, and adds digits so that a failure never reads as the limit', () => {
    expect(judge({ mm: 35 }).reason).toBe('35 mm is 3 mm less than the least accepted 38 mm.');
    expect(judge({ mm: 37.9996 }).reason).toContain('37.9996 mm is 0.0004 mm less');
    expect(judge({ mm: 53 }, band).reason).toBe('53 mm is 3 mm more than the most accepted 50 mm.');
    expect(judge({ mm: 38 }).reason).toBe('38 mm is exactly the least accepted, which is met.');
  });
});

describe('flags', () => {
  test('at limit, inside uncertainty', () => {
    expect(judge({ mm: 38 }).flags).toEqual(['at-limit', 'inside-uncertainty']);
    expect(judge({ mm: 38.5 }).flags).toEqual(['inside-uncertainty']);
    expect(judge({ mm: 37.5 }).flags).toEqual(['inside-uncertainty']);
    expect(judge({ mm: 39 }).flags).toEqual([]);
    expect(judge({ mm: 50 }, band).flags).toContain('at-limit');
    expect(judge({ mm: 38 }, atLeast38, { uncertaintyMm: null, status: 'good' }).flags).toEqual(['at-limit']);
  });
});

describe('not verified', () => {
  test.each<[string, ReadingToJudge, CoverLimits | null, InstrumentAtReading, RegExp]>([
    ['no unit', { mm: null }, atLeast38, good, /unit/],
    ['steel without a requirement', { mm: 20 }, null, good, /no requirement/],
    ['suspect', { mm: 20 }, atLeast38, { ...good, status: 'suspect' }, /suspect/],
    ['out of calibration', { mm: 60 }, atLeast38, { ...good, status: 'out-of-calibration' }, /calibration/],
    ['unknown instrument', { mm: 60 }, atLeast38, { ...good, status: 'unknown' }, /instrument/],
    ['not confirmed', { mm: 60, confirmed: false }, atLeast38, good, /confirmed/],
    ['below zero', { mm: -1 }, atLeast38, good, /plausible/],
    ['more than the section', { mm: 201, sectionMm: 200 }, atLeast38, good, /plausible/],
    ['not a number', { mm: Number.NaN }, atLeast38, good, /finite/],
  ])('%s', (_, reading, requirement, instrument, reason) => {
    const judged = judge(reading, requirement, instrument);
    expect(judged).toMatchObject({ verdict: 'not-verified', side: null, marginMm: null });
    expect(judged.reason).toMatch(reason);
  });

  test('only a reading to steel without a requirement is indicative', () => {
    expect(judge({ mm: 20 }, null).flags).toEqual(['indicative']);
    expect(judge({ mm: 20 }, atLeast38, { ...good, status: 'suspect' }).flags).toEqual([]);
  });

  test('a reading as deep as the section is still plausible', () => {
    expect(judge({ mm: 200, sectionMm: 200 }).verdict).toBe('met');
  });
});

describe('guarded acceptance', () => {
  test('is met only outside the guard band, which is U unless the project sets it', () => {
    expect(judge({ mm: 39 }, atLeast38, good, guarded).verdict).toBe('met');
    expect(judge({ mm: 38.9 }, atLeast38, good, guarded)).toMatchObject({ verdict: 'not-met', side: 'low' });
    expect(judge({ mm: 38.9 }, atLeast38, good, { kind: 'guarded', guardMm: 0.5 }).verdict).toBe('met');
    expect(judge({ mm: 49.5 }, band, good, guarded)).toMatchObject({ verdict: 'not-met', side: 'high' });
    expect(judge({ mm: 38.9 }, atLeast38, good, guarded).reason).toContain('guard band of 1 mm');
  });

  test('without U and g nothing is met, and what fails anyway still fails', () => {
    const unknown: InstrumentAtReading = { uncertaintyMm: null, status: 'good' };
    expect(judge({ mm: 80 }, atLeast38, unknown, guarded).verdict).toBe('not-verified');
    expect(judge({ mm: 30 }, atLeast38, unknown, guarded).verdict).toBe('not-met');
    expect(judge({ mm: 80 }, atLeast38, unknown, { kind: 'guarded', guardMm: 2 }).verdict).toBe('met');
  });
});

describe('go/no-go', () => {
  const block = (blockMm: number, passes: boolean, requirement = atLeast38, rule: ReadingRule = simple) =>
    judge({ mm: null, goNoGo: { blockMm, passes } }, requirement, good, rule).verdict;

  test('proves "at least" or "less than" and nothing more', () => {
    expect(block(38, true)).toBe('met');
    expect(block(40, true)).toBe('met');
    expect(block(35, true)).toBe('not-verified');
    expect(block(38, false)).toBe('not-met');
    expect(block(35, false)).toBe('not-met');
    expect(block(40, false)).toBe('not-verified');
  });

  test('never shows that an upper limit is kept, but can show that it is not', () => {
    expect(block(38, true, band)).toBe('not-verified');
    expect(block(51, true, band)).toBe('not-met');
    expect(block(50, true, band)).toBe('not-verified');
  });

  test('under the guarded rule the block has to clear the guard band', () => {
    expect(block(38, true, atLeast38, guarded)).toBe('not-verified');
    expect(block(39, true, atLeast38, guarded)).toBe('met');
    expect(block(39, false, atLeast38, guarded)).toBe('not-met');
  });
});

describe('impossible input is refused with its field', () => {
  test.each<[string, CoverLimits, ReadingRule, ReadingToJudge]>([
    ['leastAcceptedMm', { leastAcceptedMm: Number.NaN, mostAcceptedMm: null }, simple, { mm: 38 }],
    ['mostAcceptedMm', { leastAcceptedMm: 40, mostAcceptedMm: 30 }, simple, { mm: 38 }],
    ['guardMm', atLeast38, { kind: 'guarded', guardMm: -1 }, { mm: 38 }],
    ['goNoGo.blockMm', atLeast38, simple, { mm: null, goNoGo: { blockMm: 0, passes: true } }],
  ])('%s', (field, requirement, rule, reading) => {
    expect(() => judgeReading(reading, requirement, good, rule, 'mm')).toThrow(
      expect.objectContaining({ name: 'ConcreteError', field }),
    );
  });
});

describe('what holds for every reading', () => {
  const rank: Record<Verdict, number> = { 'not-met': 0, 'not-verified': 1, met: 2 };
  const length = fc.oneof(
    fc.double({ min: 0, max: 120, noNaN: true }),
    fc.integer({ min: 0, max: 80 }).map((sixteenths) => (sixteenths * 25.4) / 16),
    fc.integer({ min: 0, max: 120 }),
  );
  const limits = fc.tuple(length, fc.option(length)).map(([least, more]): CoverLimits => ({
    leastAcceptedMm: least,
    mostAcceptedMm: more === null ? null : least + more,
  }));
  const rule = fc.oneof(
    fc.constant(simple),
    fc.constant(guarded),
    fc.double({ min: 0, max: 10, noNaN: true }).map((guardMm): ReadingRule => ({ kind: 'guarded', guardMm })),
  );
  const instrument = fc.record<InstrumentAtReading>({
    uncertaintyMm: fc.option(fc.double({ min: 0, max: 8, noNaN: true })),
    status: fc.constantFrom('good', 'good', 'good', 'suspect', 'out-of-calibration', 'unknown'),
  });
  const reading = fc.oneof(
    length.map((mm): ReadingToJudge => ({ mm })),
    fc.tuple(length, fc.boolean()).map(([size, passes]): ReadingToJudge => ({
      mm: null,
      goNoGo: { blockMm: size + 0.5, passes },
    })),
  );

  test('a narrower accepted band never yields a better verdict', () => {
    const narrowing = fc.tuple(length, fc.option(length));
    fc.assert(
      fc.property(reading, limits, narrowing, instrument, rule, (read, wide, [up, down], by, with_) => {
        const least = wide.leastAcceptedMm + up;
        const most =
          wide.mostAcceptedMm === null
            ? down === null
              ? null
              : least + down
            : Math.max(least, wide.mostAcceptedMm - (down ?? 0));
        // A band that would have to grow upwards to stay a band is no narrowing.
        fc.pre(wide.mostAcceptedMm === null || most === null || most <= wide.mostAcceptedMm);
        const narrow: CoverLimits = { leastAcceptedMm: least, mostAcceptedMm: most };
        const before = judgeReading(read, wide, by, with_, 'mm').verdict;
        const after = judgeReading(read, narrow, by, with_, 'mm').verdict;
        expect(rank[after]).toBeLessThanOrEqual(rank[before]);
      }),
      { numRuns: 3000 },
    );
  });

  test('with no plus limit a larger reading never turns met into not met', () => {
    fc.assert(
      fc.property(length, length, length, instrument, rule, (mm, more, least, by, with_) => {
        const open: CoverLimits = { leastAcceptedMm: least, mostAcceptedMm: null };
        fc.pre(judgeReading({ mm }, open, by, with_, 'mm').verdict === 'met');
        expect(judgeReading({ mm: mm + more }, open, by, with_, 'mm').verdict).toBe('met');
      }),
    );
  });

  test('the guarded rule is never kinder than simple acceptance', () => {
    fc.assert(
      fc.property(reading, limits, instrument, rule, (read, requirement, by, with_) => {
        const kind = judgeReading(read, requirement, by, simple, 'mm').verdict;
        const strict = judgeReading(read, requirement, by, with_, 'mm').verdict;
        expect(rank[strict]).toBeLessThanOrEqual(rank[kind]);
      }),
    );
  });

  test('the unit of entry and the unit shown never change a verdict', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 16 * 5 }),
        limits,
        instrument,
        rule,
        (sixteenths, requirement, by, with_) => {
          const ways = [
            `${Math.floor(sixteenths / 16)} ${sixteenths % 16}/16 in`,
            `${sixteenths / 16} in`,
            `0' ${sixteenths / 16}"`,
            `${(sixteenths * 254) / 160} mm`,
            `${(sixteenths * 254) / 1600} cm`,
          ];
          const verdicts = ways.flatMap((text) => {
            const parsed = parseLength(text);
            if (!parsed.ok) throw new Error(`${text}: ${parsed.problem}`);
            return (['mm', 'in'] as const).map((unit) => {
              const judged = judgeReading({ mm: parsed.length.mm }, requirement, by, with_, unit);
              return `${judged.verdict} ${judged.side ?? ''} ${judged.flags.join()}`;
            });
          });
          expect(new Set(verdicts).size).toBe(1);
        },
      ),
    );
  });

  test('the reason of a failure never shows the reading as its limit', () => {
    fc.assert(
      fc.property(length, limits, fc.constantFrom('mm', 'in'), (mm, requirement, unit) => {
        const judged = judgeReading({ mm }, requirement, good, simple, unit as 'mm' | 'in');
        fc.pre(judged.verdict === 'not-met');
        const limit = judged.side === 'low' ? requirement.leastAcceptedMm : (requirement.mostAcceptedMm ?? 0);
        expect(judged.reason.startsWith(`${withUnit(limit, unit as 'mm' | 'in')} is`)).toBe(false);
        expect(judged.reason).not.toMatch(/ is 0 (mm|in) /);
      }),
    );
  });
});
