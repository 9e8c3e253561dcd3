import { describe, expect, test } from 'vitest';
import { enBondCondition, enBondStrength, type StrengthClass } from '@/lib/concrete/anchorage-en';
import { barListMasses } from '@/lib/concrete/bar-list-masses';
import {
  barsAcrossBay,
  greatestSpacing,
  judgeBarCount,
  judgeClearDistances,
  judgeSpacing,
  spacingOverGaps,
} from '@/lib/concrete/bar-spacing';
import { barsInWidth } from '@/lib/concrete/bars-in-width';
import { hookExtension, judgeBend, judgeFieldBend } from '@/lib/concrete/bends';
import { aciDevelopmentCompression, aciDevelopmentSimple } from '@/lib/concrete/development';
import { judgeCoupler, judgeEmbedment, judgeLap, judgeStagger, shareLapped } from '@/lib/concrete/lap-layout';
import { aciCompressionLap, aciTensionLap, enLapLength, lapTolerance } from '@/lib/concrete/laps';
import { psiToMPa } from '@/lib/concrete/stress-units';
import {
  judgeLoadedBay,
  judgeSupportSpacing,
  supportHeight,
  supportHeightLimits,
} from '@/lib/concrete/supports';
import { judgeTendonHeight, tendonBand, tendonHeightBetween, tendonHeightTo } from '@/lib/concrete/tendons';
import { intersectionsPerSquareMetre, judgeTieSamples, requiredTies } from '@/lib/concrete/ties';
import { usBarNumber } from '@/lib/concrete/us-bar-number';

const IN = 25.4;

describe('bar number of the ACI tables', () => {
  test('a metric bar takes the next larger row', () => {
    expect([9.5, 10, 12, 16, 20, 25, 28, 32, 36, 40].map(usBarNumber)).toEqual([
      3, 4, 4, 6, 7, 8, 9, 10, 14, 14,
    ]);
  });
  test('the rounded millimetres of the tables keep their own number', () => {
    const tabled = [9.5, 12.7, 15.9, 19.1, 22.2, 25.4, 28.7, 32.3, 35.8, 43.0, 57.3];
    expect(tabled.map(usBarNumber)).toEqual([3, 4, 5, 6, 7, 8, 9, 10, 11, 14, 18]);
    expect(() => usBarNumber(60)).toThrow(/larger than #18/);
  });
});

describe('supports', () => {
  const slab = {
    thicknessMm: 200,
    topCoverMm: 40,
    carried: [
      { name: 'T1', diameterMm: 16 },
      { name: 'T2', diameterMm: 12 },
    ],
    standsOn: [
      { name: 'Bottom cover', sizeMm: 25 },
      { name: 'B1', sizeMm: 12 },
      { name: 'B2', sizeMm: 12 },
    ],
  };

  test('height is thickness less all that is not the support, and the parts fill the section', () => {
    // 200 − 40 − 16 − 12 − 25 − 12 − 12 = 83.
    const { heightMm, parts, trail } = supportHeight(slab);
    expect(heightMm).toBe(83);
    expect(trail[0]?.value).toBe('200 − 40 − 16 − 12 − 25 − 12 − 12 = 83 mm');
    expect(parts.map((part) => [part.name, part.fromTopMm, part.sizeMm])).toEqual([
      ['Top cover', 0, 40],
      ['T1', 40, 16],
      ['T2', 56, 12],
      ['Support', 68, 83],
      ['B2', 151, 12],
      ['B1', 163, 12],
      ['Bottom cover', 175, 25],
    ]);
  });

  test('a section with no room for it is refused', () => {
    expect(() => supportHeight({ ...slab, thicknessMm: 117 })).toThrow(/no room/);
    expect(() => supportHeight({ ...slab, topCoverMm: 200 })).toThrow(/as large as the section/);
    expect(() => supportHeight({ ...slab, carried: [] })).toThrow(/empty/);
  });

  test('what the cover may lose is what the support may be too high', () => {
    const { leastMm, mostMm } = supportHeightLimits(83, { coverMinusMm: 10, depthMinusMm: 5 });
    expect([leastMm, mostMm]).toEqual([78, 93]);
  });

  test('one spacing over its limit fails, however good the others are', () => {
    expect(judgeSupportSpacing([800, 1000, 900], 1000).verdict).toBe('met');
    const over = judgeSupportSpacing([300, 1000.001, 300], 1000);
    expect([over.verdict, over.side, over.worstMm]).toEqual(['not-met', 'high', 1000.001]);
  });

  test('a bay has to meet before, under and after load', () => {
    const limits = { least: 40 };
    expect(judgeLoadedBay({ before: 45, under: 41, after: 44 }, limits)).toMatchObject({
      verdict: 'met',
      stayedDownMm: 1,
    });
    expect(judgeLoadedBay({ before: 45, under: 39, after: 45 }, limits).verdict).toBe('not-met');
    expect(judgeLoadedBay({ before: 45, after: 45 }, limits)).toMatchObject({
      verdict: 'not-verified',
      missing: ['under'],
    });
    // What is missing never hides what failed.
    expect(judgeLoadedBay({ under: 39 }, limits).verdict).toBe('not-met');
  });
});

describe('ties', () => {
  test('share, alternate and every, rounded up', () => {
    const required = (pattern: Parameters<typeof requiredTies>[0]['pattern'], intersections: number) =>
      requiredTies({ pattern, intersections }).required;
    expect(required({ kind: 'every' }, 10)).toBe(10);
    expect(required({ kind: 'alternate' }, 11)).toBe(6);
    expect(required({ kind: 'share', share: 0.7 }, 10)).toBe(7);
    expect(required({ kind: 'share', share: 0.71 }, 10)).toBe(8);
    expect(required({ kind: 'share', share: 1 }, 10)).toBe(10);
    expect(() => required({ kind: 'by-spacing' }, 10)).toThrow(/spacing in x/);
  });

  test('each square by itself, three of them, one at an edge', () => {
    const good = { tied: 25, intersections: 49, required: 25, atEdge: false };
    expect(judgeTieSamples([good, good, { ...good, atEdge: true }]).verdict).toBe('met');
    expect(judgeTieSamples([good, good, good]).verdict).toBe('not-verified');
    expect(judgeTieSamples([good, { ...good, atEdge: true }]).verdict).toBe('not-verified');
    const loose = { ...good, tied: 24 };
    const dense = { ...good, tied: 49, atEdge: true };
    expect(judgeTieSamples([dense, dense, loose]).verdict).toBe('not-met');
    expect(judgeTieSamples([loose]).verdict).toBe('not-met');
  });

  test('more ties than intersections is refused', () => {
    expect(() => judgeTieSamples([{ tied: 50, intersections: 49, required: 25, atEdge: true }])).toThrow(
      /more/,
    );
  });

  test('intersections per m²', () => {
    expect(intersectionsPerSquareMetre(200, 250).perSquareMetre).toBe(20);
  });
});

describe('spacing and count', () => {
  test('clear distance has no minus tolerance and no averaging', () => {
    expect(judgeClearDistances([30, 25, 60], 25).verdict).toBe('met');
    expect(judgeClearDistances([30, 24.99, 60], 25)).toMatchObject({
      verdict: 'not-met',
      narrowestMm: 24.99,
    });
  });

  test('never fewer bars than specified', () => {
    expect(judgeBarCount(26, 27).verdict).toBe('not-met');
    expect(judgeBarCount(27, 27).verdict).toBe('met');
    expect(judgeBarCount(28, 27).verdict).toBe('met');
  });

  test('bars across a bay', () => {
    const count = (widthMm: number, spacingMm: number) =>
      barsAcrossBay({ widthMm, firstBarFromEdgeMm: 50, spacingMm }).count;
    expect(count(4000, 150)).toBe(27); // 3900/150 = 26 gaps
    expect(count(4001, 150)).toBe(28);
    expect(count(100, 150)).toBe(1);
    expect(() => count(99, 150)).toThrow(/more than the width/);
    // 0.1 + 0.2 in binary: 3 gaps of 0.1 m are 3, not 4.
    expect(barsAcrossBay({ widthMm: 300.00000000000006, firstBarFromEdgeMm: 0, spacingMm: 100 }).count).toBe(
      4,
    );
  });

  test('bars between the ties of a width: as many as fit, and not one more', () => {
    // Arithmetic: 300 − 2 × (40 + 8) = 204; (204 + 25) / (20 + 25) = 5.09.
    const layer = { widthMm: 300, sideCoverMm: 40, tieDiameterMm: 8, diameterMm: 20, leastClearMm: 25 };
    expect(barsInWidth(layer)).toMatchObject({ mostBars: 5, clearMm: null });
    expect(barsInWidth({ ...layer, bars: 5 }).clearMm).toBeCloseTo(26, 9);
    expect(barsInWidth({ ...layer, bars: 6 }).clearMm).toBeCloseTo(16.8, 9);
    // Exactly what five need: 5 × 20 + 4 × 25 = 200.
    expect(barsInWidth({ ...layer, widthMm: 296 }).mostBars).toBe(5);
    expect(barsInWidth({ ...layer, widthMm: 295.9 }).mostBars).toBe(4);
    expect(() => barsInWidth({ ...layer, bars: 11 })).toThrow(/wider than the room/);
    expect(() => barsInWidth({ ...layer, widthMm: 115 })).toThrow(/no room for one/);
    expect(barsInWidth({ ...layer, widthMm: 12 * 25.4, showIn: 'in' }).trail[0]?.value).toMatch(/^12 − 2 × /);
  });

  test('the mean over gaps against tolerance, and against the code without one', () => {
    expect(spacingOverGaps({ overallMm: 1550, gaps: 10 }).spacingMm).toBe(155);
    const judge = (spacingMm: number, codeMostMm: number | null) =>
      judgeSpacing({ spacingMm, specifiedMm: 300, minusMm: null, plusMm: 75, codeMostMm }).verdict;
    expect(judge(375, null)).toBe('met');
    expect(judge(375.1, null)).toBe('not-met');
    expect(judge(330, 320)).toBe('not-met');
    expect(judge(150, 320)).toBe('met');
  });

  test('a basis without a row for the use is refused', () => {
    expect(() => greatestSpacing({ basis: 'en-1992-1-1', use: 'wall', thicknessMm: 200 })).toThrow(
      /no greatest/,
    );
  });
});

describe('bends', () => {
  test('verdicts and refusals', () => {
    expect(judgeBend(63.9, 64).verdict).toBe('not-met');
    expect(judgeBend(64, 64).verdict).toBe('met');
    expect(() => hookExtension({ use: 'main', angle: 135, diameterMm: 16 })).toThrow(/hook of ties/);
    expect(judgeFieldBend({ material: 'steel', permittedByEngineer: false }).verdict).toBe('not-met');
    expect(judgeFieldBend({ material: 'steel', permittedByEngineer: true }).verdict).toBe('met');
  });
});

describe('development and laps', () => {
  const bar = {
    diameterMm: 25.4,
    fyMPa: psiToMPa(60_000),
    fcMPa: psiToMPa(4000),
    lightweight: false,
    coating: 'uncoated',
    topBar: false,
    clearCoverMm: 50,
    clearSpacingMm: 150,
  } as const;

  test('the lap is taken before the least of ld, and has its own', () => {
    const small = aciDevelopmentSimple(
      { ...bar, diameterMm: 0.375 * IN, fyMPa: psiToMPa(40_000) },
      'confined',
    );
    expect(small.lengthMm).toBeCloseTo(12 * IN, 9);
    expect(small.beforeLeastMm).toBeLessThan(12 * IN);
    const lap = aciTensionLap({ diameterMm: 0.375 * IN, development: small, lapClass: 'B' });
    expect(lap.lengthMm).toBeCloseTo(Math.max(1.3 * small.beforeLeastMm, 12 * IN), 9);
  });

  test('Grade 100 and above are handled or refused, never guessed', () => {
    expect(() => aciDevelopmentSimple({ ...bar, fyMPa: psiToMPa(120_000) }, 'confined')).toThrow(/Grade 100/);
    const high = aciDevelopmentSimple({ ...bar, fyMPa: psiToMPa(80_000) }, 'confined');
    expect(high.trail.some((step) => step.clause.includes('25.4.2.2'))).toBe(true);
  });

  test('420 MPa is Grade 60', () => {
    const si = aciDevelopmentSimple({ ...bar, fyMPa: 420 }, 'confined').lengthMm;
    const us = aciDevelopmentSimple(bar, 'confined').lengthMm;
    expect(si / us).toBeCloseTo(420 / psiToMPa(60_000), 9);
  });

  test('compression: development, and laps above Grade 60', () => {
    // #8, 60 ksi, 4 ksi: 60000/(50 √4000) = 18.97 in.
    const plain = aciDevelopmentCompression({ ...bar, confined: false });
    expect(plain.lengthMm / IN).toBeCloseTo(60_000 / (50 * Math.sqrt(4000)), 9);
    expect(aciDevelopmentCompression({ ...bar, confined: true }).lengthMm).toBeCloseTo(
      0.75 * plain.lengthMm,
      9,
    );
    const lap = (fyPsi: number, tensionLapMm?: number) =>
      aciCompressionLap({ diameterMm: 25.4, fyMPa: psiToMPa(fyPsi), fcMPa: psiToMPa(4000), tensionLapMm })
        .lengthMm / IN;
    expect(lap(75_000)).toBeCloseTo(0.0009 * 75_000 - 24, 9);
    expect(() => lap(100_000)).toThrow(/tension lap/);
    expect(lap(100_000, 90 * IN)).toBeCloseTo(90, 9);
  });

  test('EN: bond above C60/75 is held there unless it is verified, and other bond is 0.7', () => {
    const bond = (strengthClass: StrengthClass, bondVerifiedAboveC60: boolean) =>
      enBondStrength({ strengthClass, diameterMm: 8, condition: 'good', bondVerifiedAboveC60 }).fbdMPa;
    expect(bond('C80/95', false)).toBe(bond('C60/75', false));
    expect(bond('C80/95', true)).toBeGreaterThan(bond('C60/75', false));
    expect(() => bond('C99/100' as StrengthClass, false)).toThrow(/not one of the choices/);
  });

  test('EN: bond condition by place', () => {
    const at = (depthMm: number, aboveUndersideMm: number, inclinationDegrees = 0) =>
      enBondCondition({ depthMm, aboveUndersideMm, inclinationDegrees }).condition;
    expect([at(250, 240), at(500, 250), at(500, 251), at(700, 400), at(700, 401), at(500, 450, 45)]).toEqual([
      'good',
      'good',
      'other',
      'good',
      'other',
      'good',
    ]);
  });

  test('EN: factors outside their table are refused, large bars are flagged', () => {
    const lap = { strengthClass: 'C30/37', condition: 'good', sigmaSdMPa: 435, sharePercent: 100 } as const;
    expect(() => enLapLength({ ...lap, diameterMm: 16, alpha2: 0.6 })).toThrow(/α2/);
    expect(() => enLapLength({ ...lap, diameterMm: 16, alpha2: 0.8, alpha3: 0.8 })).toThrow(/product/);
    expect(enLapLength({ ...lap, diameterMm: 40 }).trail.some((step) => step.clause.includes('8.8'))).toBe(
      true,
    );
  });

  test('lap tolerance by basis and size', () => {
    const least = (rule: Parameters<typeof lapTolerance>[0], diameterMm = 20) =>
      lapTolerance(rule, { diameterMm, requiredMm: 1000 }).leastMm;
    expect(least('none')).toBe(1000);
    expect(least('aci-117-10')).toBeCloseTo(1000 - 25.4, 9);
    expect(least('aci-117-10', 43)).toBeCloseTo(1000 - 50.8, 9);
    expect(least('en-13670')).toBeCloseTo(940, 9);
    expect(() => least({ minusMm: 1000 })).toThrow(/as large as the lap/);
  });

  test('a short lap comes with its ways out', () => {
    expect(judgeLap(940, 940)).toMatchObject({ verdict: 'met', shortByMm: 0, waysOut: [] });
    const short = judgeLap(900, 940);
    expect([short.verdict, short.shortByMm, short.waysOut.length]).toEqual(['not-met', 40, 3]);
  });

  test('laps of one section count together', () => {
    const share = (rule: 'aci-318-19' | 'en-1992-1-1', centres: number[]) =>
      shareLapped({ rule, lapCentresMm: centres, bars: 8, lapMm: 1000 }).share;
    expect(share('en-1992-1-1', [0, 1300, 2700])).toBe(0.25);
    expect(share('en-1992-1-1', [0, 1301])).toBe(0.125);
    expect(share('aci-318-19', [0, 1000, 500, 2500])).toBe(0.375);
    expect(share('aci-318-19', [])).toBe(0);
    expect(() =>
      share(
        'aci-318-19',
        Array.from({ length: 9 }, () => 0),
      ),
    ).toThrow(/more laps than bars/);
    expect(judgeStagger([300, 299], 300).verdict).toBe('not-met');
  });

  test('a starter that moves is not met, one that nobody pulled is not verified', () => {
    const judge = (measuredMm: number, pulled: Parameters<typeof judgeEmbedment>[0]['pulled']) =>
      judgeEmbedment({ measuredMm, leastMm: 600, pulled }).verdict;
    expect(judge(700, 'held')).toBe('met');
    expect(judge(700, 'moved')).toBe('not-met');
    expect(judge(700, 'not-pulled')).toBe('not-verified');
    expect(judge(599, 'not-pulled')).toBe('not-met');
    expect(judge(600, 'not-a-starter')).toBe('met');
  });

  test('couplers by type, witness mark and threads', () => {
    const coupler = {
      plannedType: 'Parallel thread, type 2',
      foundType: 'parallel thread, type 2',
      witnessMarks: 'both-in',
      exposedThreads: 1,
      mostExposedThreads: 2,
    } as const;
    expect(judgeCoupler(coupler).verdict).toBe('met');
    expect(judgeCoupler({ ...coupler, foundType: 'Taper thread' }).verdict).toBe('not-met');
    expect(judgeCoupler({ ...coupler, witnessMarks: 'one-short' }).verdict).toBe('not-met');
    expect(judgeCoupler({ ...coupler, witnessMarks: 'not-marked' }).verdict).toBe('not-verified');
    expect(judgeCoupler({ ...coupler, exposedThreads: 3 }).verdict).toBe('not-met');
    expect(judgeCoupler({ ...coupler, exposedThreads: null }).verdict).toBe('not-verified');
  });
});

describe('tendons', () => {
  const planned = { from: 'soffit', to: 'underside', heightMm: 40, minusMm: 6.35, plusMm: 6.35 } as const;

  test('a height from another surface, or to another steel, is not verified', () => {
    const judge = (from: 'soffit' | 'top', to: 'underside' | 'centre', heightMm: number) =>
      judgeTendonHeight({ from, to, heightMm }, planned).verdict;
    expect(judge('soffit', 'underside', 46.35)).toBe('met');
    expect(judge('soffit', 'underside', 46.36)).toBe('not-met');
    expect(judge('soffit', 'underside', 33.64)).toBe('not-met');
    expect(judge('soffit', 'centre', 40)).toBe('not-verified');
    expect(judge('top', 'underside', 40)).toBe('not-verified');
  });

  test('bands by depth, the boundary in the stricter row', () => {
    const band = (inches: number) => tendonBand('aci-117-10', inches * IN).plusMm;
    expect([band(8), band(8.01), band(24), band(24.01)]).toEqual([
      0.25 * IN,
      0.375 * IN,
      0.375 * IN,
      0.5 * IN,
    ]);
    expect(tendonBand('as-3600', 200).minusMm).toBe(5);
  });

  test('parabola and change of datum', () => {
    const at = (fromVertexMm: number) =>
      tendonHeightBetween({ vertexHeightMm: 40, otherHeightMm: 160, runMm: 4000, fromVertexMm }).heightMm;
    expect([at(0), at(2000), at(4000)]).toEqual([40, 70, 160]);
    expect(() => at(4001)).toThrow(/from 0 to 4000/);
    expect(tendonHeightTo({ from: 'soffit', to: 'underside', heightMm: 40 }, 'centre', 20).heightMm).toBe(50);
    expect(tendonHeightTo({ from: 'top', to: 'topside', heightMm: 40 }, 'centre', 20).heightMm).toBe(50);
  });
});

describe('bar list', () => {
  test('masses by size, total, and difference to the plan', () => {
    const found = barListMasses(
      [
        { mark: 'A1', designation: '16 mm', lengthMm: 5000, count: 40 },
        { mark: 'A2', designation: '16 mm', lengthMm: 1000, count: 50 },
        { mark: 'B1', designation: '#8', lengthMm: 30_480, count: 1 },
      ],
      { planKg: 500 },
    );
    // 250 m of 16 mm at 1.58 kg/m (EN 10080, tabled) and 100 ft of #8 at 2.670 lb/ft = 267 lb (ASTM A615).
    expect(found.sizes.map((size) => [size.designation, size.bars, size.lengthM])).toEqual([
      ['Ø16', 90, 250],
      ['#8', 1, 30.48],
    ]);
    expect(found.sizes[0]?.massKg).toBeCloseTo(395, 0);
    expect((found.sizes[1]?.massKg ?? 0) / 0.45359237).toBeCloseTo(267, 0);
    expect(found.differenceKg).toBeCloseTo(found.totalKg - 500, 12);
  });

  test('an unknown size names its mark', () => {
    const rows = [{ mark: 'C7', designation: '17', lengthMm: 1000, count: 1 }];
    expect(() => barListMasses(rows)).toThrow(/mark C7, size/);
    expect(() => barListMasses([])).toThrow(/empty/);
  });
});
