import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { coverRequirement } from '@/lib/concrete/cover-requirement';
import { judgeLimits } from '@/lib/concrete/judge-measurement';
import {
  judgeReading,
  type CoverLimits,
  type InstrumentAtReading,
  type ReadingRule,
  type ReadingToJudge,
  type Verdict,
} from '@/lib/concrete/judge-reading';
import { MM_PER_INCH, parseLength, type LengthUnit } from '@/lib/concrete/length';

/** Not met is worst, met is best; what is not verified proves neither. */
const rank: Record<Verdict, number> = { 'not-met': 0, 'not-verified': 1, met: 2 };

/** Sixteenths of an inch and tenths of a millimetre, so that values often lie on a limit. */
const length = fc.oneof(
  fc.integer({ min: 0, max: 160 }).map((n) => (n / 16) * MM_PER_INCH),
  fc.integer({ min: 0, max: 2500 }).map((n) => n / 10),
);
const rule: fc.Arbitrary<ReadingRule> = fc.oneof(
  fc.constant<ReadingRule>({ kind: 'simple' }),
  fc.record({ kind: fc.constant('guarded' as const), guardMm: fc.constantFrom(0, 0.5, 2, 5) }),
  fc.constant<ReadingRule>({ kind: 'guarded' }),
);
const instrument: fc.Arbitrary<InstrumentAtReading> = fc.record({
  uncertaintyMm: fc.constantFrom(null, 0, 1, 3),
  status: fc.constantFrom('good' as const, 'suspect' as const),
});
const unit = fc.constantFrom<LengthUnit>('mm', 'in');
const reading: fc.Arbitrary<ReadingToJudge> = fc.oneof(
  length.map((mm) => ({ mm })),
  fc.record({
    mm: fc.constant(null),
    goNoGo: fc.record({ blockMm: length.filter((mm) => mm > 0), passes: fc.boolean() }),
  }),
);
const limits: fc.Arbitrary<CoverLimits> = fc.tuple(length, length, fc.boolean()).map(([a, b, open]) => ({
  leastAcceptedMm: Math.min(a, b),
  mostAcceptedMm: open ? null : Math.max(a, b),
}));

/** A band inside the given one; an open end may be closed. */
const inside = (of: CoverLimits) =>
  fc.tuple(length, length, fc.boolean()).map(([a, b, open]): CoverLimits => {
    const top = of.mostAcceptedMm;
    const within = (mm: number) => Math.min(Math.max(mm, of.leastAcceptedMm), top ?? Infinity);
    const [low, high] = [within(Math.min(a, b)), within(Math.max(a, b))];
    return { leastAcceptedMm: low, mostAcceptedMm: open ? top : high };
  });

describe('verdicts', () => {
  test('a narrower accepted band never yields a better verdict of a reading', () => {
    fc.assert(
      fc.property(
        reading,
        limits.chain((wide) => fc.tuple(fc.constant(wide), inside(wide))),
        instrument,
        rule,
        unit,
        (read, [wide, narrow], at, by, shown) => {
          const verdict = (band: CoverLimits) => rank[judgeReading(read, band, at, by, shown).verdict];
          expect(verdict(narrow)).toBeLessThanOrEqual(verdict(wide));
        },
      ),
      { numRuns: 3000 },
    );
  });

  test('nor of a measurement', () => {
    fc.assert(
      fc.property(
        length,
        limits.chain((wide) => fc.tuple(fc.constant(wide), inside(wide))),
        (mm, [wide, narrow]) => {
          const verdict = (band: CoverLimits) =>
            rank[judgeLimits(mm, { least: band.leastAcceptedMm, most: band.mostAcceptedMm }, 'mm').verdict];
          expect(verdict(narrow)).toBeLessThanOrEqual(verdict(wide));
        },
      ),
      { numRuns: 2000 },
    );
  });

  test('a wider guard band never yields a better verdict either', () => {
    fc.assert(
      fc.property(reading, limits, instrument, length, length, (read, band, at, a, b) => {
        const verdict = (guardMm: number) =>
          rank[judgeReading(read, band, at, { kind: 'guarded', guardMm }, 'mm').verdict];
        expect(verdict(Math.max(a, b))).toBeLessThanOrEqual(verdict(Math.min(a, b)));
      }),
      { numRuns: 2000 },
    );
  });

  test('where no plus limit is set, a larger reading never turns met into not met', () => {
    fc.assert(
      fc.property(length, length, length, instrument, rule, (least, a, b, at, by) => {
        const verdict = (mm: number) =>
          judgeReading({ mm }, { leastAcceptedMm: least, mostAcceptedMm: null }, at, by, 'mm').verdict;
        const [smaller, larger] = [Math.min(a, b), Math.max(a, b)];
        if (verdict(smaller) === 'met') expect(verdict(larger)).toBe('met');
        const measured = (mm: number) => judgeLimits(mm, { least }, 'mm').verdict;
        if (measured(smaller) === 'met') expect(measured(larger)).toBe('met');
      }),
      { numRuns: 2000 },
    );
  });

  test('nor does a larger block that passes', () => {
    const block = length.filter((mm) => mm > 0);
    fc.assert(
      fc.property(length, block, block, instrument, rule, (least, a, b, at, by) => {
        const verdict = (blockMm: number) =>
          judgeReading(
            { mm: null, goNoGo: { blockMm, passes: true } },
            { leastAcceptedMm: least, mostAcceptedMm: null },
            at,
            by,
            'mm',
          ).verdict;
        if (verdict(Math.min(a, b)) === 'met') expect(verdict(Math.max(a, b))).toBe('met');
      }),
    );
  });

  test('the unit of entry never changes a verdict, nor does the unit it is shown in', () => {
    const mmOf = (text: string): number => {
      const read = parseLength(text);
      if (!read.ok || read.length.mm === null) throw new Error(`${text} is not read`);
      return read.length.mm;
    };
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 320 }), limits, instrument, rule, (parts, band, at, by) => {
        const mm = (parts * 254) / 160;
        const whole = Math.floor(parts / 16);
        const fraction = parts % 16 === 0 ? '' : `${parts % 16}/16`;
        const entered = [
          `${whole} ${fraction}`.trim() === `0 ${fraction}` ? `${fraction} in` : `${whole} ${fraction} in`,
          `${parts / 16}"`,
          `${mm} mm`,
          `${mm / 10} cm`,
          `${mm / 1000} m`,
          `0' ${parts / 16 < 12 ? `${parts / 16}"` : `${0}"`}`,
        ].slice(0, parts / 16 < 12 ? 6 : 5);
        const verdicts = entered.flatMap((text) =>
          (['mm', 'in'] as const).map((shown) => judgeReading({ mm: mmOf(text) }, band, at, by, shown)),
        );
        const [first] = verdicts;
        for (const one of verdicts) {
          expect([one.verdict, one.side, one.flags]).toEqual([first?.verdict, first?.side, first?.flags]);
        }
      }),
      { numRuns: 2000 },
    );
  });
});

describe('requirements', () => {
  const cover = {
    basis: 'aci-318-19',
    element: 'slab',
    meeting: 'formed',
    exposure: 'not-exposed',
    barDiameterMm: 16,
    thicknessMm: 300,
  } as const;

  test('a smaller permitted minus never lowers what is accepted, and never what is specified', () => {
    const minus = fc.double({ min: 0, max: 30, noNaN: true });
    fc.assert(
      fc.property(fc.double({ min: 40, max: 120, noNaN: true }), minus, minus, (specified, a, b) => {
        const by = (contractMinusMm: number) =>
          coverRequirement({ ...cover, contractSpecifiedMm: specified, contractMinusMm });
        const [tight, loose] = [by(Math.min(a, b)), by(Math.max(a, b))];
        expect(tight.leastAcceptedMm).toBeGreaterThanOrEqual(loose.leastAcceptedMm);
        expect(tight.specifiedMm).toBe(loose.specifiedMm);
      }),
    );
  });
});
