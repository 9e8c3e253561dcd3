import { describe, expect } from 'vitest';
import { enBasicAnchorage, enBondStrength, strengthClasses } from '@/lib/concrete/anchorage-en';
import {
  aciDevelopmentGeneral,
  aciDevelopmentSimple,
  simpleCase,
  type AciBar,
} from '@/lib/concrete/development';
import { enLapArrangement } from '@/lib/concrete/lap-layout';
import {
  aciCompressionLap,
  aciLapClass,
  aciTensionLap,
  enAlpha6Factor,
  enLapLength,
  nonContactLapMost,
} from '@/lib/concrete/laps';
import { psiToMPa } from '@/lib/concrete/stress-units';
import { numberAt, textAt, Topic } from './load-records';

const topic = new Topic('05-laps-development');
const IN = 25.4;

function aciBar(over: Partial<AciBar> & { dbIn?: number; fcPsi?: number; fyPsi?: number } = {}): AciBar {
  const { dbIn = 1, fcPsi = 4000, fyPsi = 60_000, ...rest } = over;
  return {
    diameterMm: dbIn * IN,
    fcMPa: psiToMPa(fcPsi),
    fyMPa: psiToMPa(fyPsi),
    lightweight: false,
    coating: 'uncoated',
    topBar: false,
    clearCoverMm: 2 * IN,
    clearSpacingMm: 6 * IN,
    ...rest,
  };
}

const inches = (mm: number) => mm / IN;

describe('ACI 318-19 development', () => {
  topic.check('lap.aci.general', (values) => {
    // #8, cb 1.5 in, no transverse steel: 3/40 × 60000/√4000 × 1/1.5 = 47.43 in, as in the simple table.
    const plain = aciDevelopmentGeneral(aciBar(), { cbMm: 1.5 * IN, transverse: null });
    expect(inches(plain.lengthMm)).toBeCloseTo((3 / 40) * (60_000 / Math.sqrt(4000)) * (1 / 1.5), 9);
    // Ktr = 40 × 0.4 / (8 × 2) = 1, so the ratio reaches the limit of 2.5.
    const tied = aciDevelopmentGeneral(aciBar(), {
      cbMm: 1.5 * IN,
      transverse: { areaMm2: 0.4 * IN * IN, spacingMm: 8 * IN, bars: 2 },
    });
    expect(inches(tied.lengthMm)).toBeCloseTo(
      inches(plain.lengthMm) * (1.5 / numberAt(values, 'conf_limit')),
      9,
    );
    const more = aciDevelopmentGeneral(aciBar(), {
      cbMm: 1.5 * IN,
      transverse: { areaMm2: 4 * IN * IN, spacingMm: 8 * IN, bars: 2 },
    });
    expect(more.lengthMm).toBeCloseTo(tied.lengthMm, 9);
    const tiny = aciDevelopmentGeneral(aciBar({ dbIn: 0.375 }), { cbMm: 2 * IN, transverse: null });
    expect(inches(tiny.lengthMm)).toBeCloseTo(numberAt(values, 'min_in'), 12);
    // √f'c stops at 100 psi.
    const strong = aciDevelopmentGeneral(aciBar({ fcPsi: 10_000 }), { cbMm: 1.5 * IN, transverse: null });
    const stronger = aciDevelopmentGeneral(aciBar({ fcPsi: 14_000 }), { cbMm: 1.5 * IN, transverse: null });
    expect(stronger.lengthMm).toBeCloseTo(strong.lengthMm, 9);
  });

  topic.check('lap.aci.factors', (values) => {
    const ld = (over: Parameters<typeof aciBar>[0]) =>
      aciDevelopmentSimple(aciBar(over), 'confined').beforeLeastMm;
    const plain = ld({});
    const ratio = (over: Parameters<typeof aciBar>[0]) => ld(over) / plain;
    expect(ratio({ topBar: true })).toBeCloseTo(numberAt(values, 'psi_t', 'more_than_12in_below'), 12);
    expect(ratio({ coating: 'epoxy' })).toBeCloseTo(
      numberAt(values, 'psi_e', 'coated_cover_lt_3db_or_clear_lt_6db'),
      12,
    );
    const wide = { coating: 'epoxy', clearCoverMm: 3 * IN, clearSpacingMm: 6 * IN } as const;
    expect(ratio(wide)).toBeCloseTo(numberAt(values, 'psi_e', 'coated_other'), 12);
    expect(ratio({ coating: 'galvanised' })).toBeCloseTo(
      numberAt(values, 'psi_e', 'uncoated_or_galvanized'),
      12,
    );
    expect(ratio({ coating: 'epoxy', topBar: true })).toBeCloseTo(numberAt(values, 'psi_te_max'), 12);
    expect(ratio({ lightweight: true })).toBeCloseTo(1 / numberAt(values, 'lambda_', 'lightweight'), 12);
    expect(ratio({ fyPsi: 80_000 }) / (80 / 60)).toBeCloseTo(numberAt(values, 'psi_g', 'G80'), 12);
    expect(ratio({ fyPsi: 100_000 }) / (100 / 60)).toBeCloseTo(numberAt(values, 'psi_g', 'G100'), 12);
    expect(ratio({ fyPsi: 40_000 }) / (40 / 60)).toBeCloseTo(numberAt(values, 'psi_g', 'G40_60'), 12);
    const general = (dbIn: number) =>
      aciDevelopmentGeneral(aciBar({ dbIn }), { cbMm: dbIn * 1.5 * IN, transverse: null }).beforeLeastMm /
      dbIn;
    const small = numberAt(values, 'psi_s', 'No6_and_smaller') / numberAt(values, 'psi_s', 'No7_and_larger');
    expect(general(0.75) / general(0.875)).toBeCloseTo(small, 12);
  });

  topic.check('lap.aci.simple', (values) => {
    const divisor = (dbIn: number, confinement: 'confined' | 'other') =>
      (60_000 * dbIn) /
      (Math.sqrt(4000) * inches(aciDevelopmentSimple(aciBar({ dbIn }), confinement).beforeLeastMm));
    expect(divisor(0.75, 'confined')).toBeCloseTo(numberAt(values, 'No6_small_case_ok'), 9);
    expect(divisor(0.875, 'confined')).toBeCloseTo(numberAt(values, 'No7_large_case_ok'), 9);
    expect(divisor(0.75, 'other')).toBeCloseTo(numberAt(values, 'No6_small_other'), 9);
    expect(divisor(0.875, 'other')).toBeCloseTo(numberAt(values, 'No7_large_other'), 9);
    const at = (coverIn: number, spacingIn: number, ties: boolean) =>
      simpleCase(aciBar({ clearCoverMm: coverIn * IN, clearSpacingMm: spacingIn * IN }), ties);
    expect([
      at(1, 1, true),
      at(1, 2, false),
      at(0.99, 2, true),
      at(1, 1.99, false),
      at(1, 0.99, true),
    ]).toEqual(['confined', 'confined', 'other', 'other', 'other']);
  });

  topic.checkAll('lap.check.aci', (values) => {
    const input = (key: string) => numberAt(values, 'inputs', key);
    const bar = aciBar({
      dbIn: input('db_in'),
      fcPsi: input('fc_psi'),
      fyPsi: input('fy_psi'),
      topBar: input('psi_t') > 1,
      lightweight: input('lambda_') < 1,
    });
    const development = aciDevelopmentSimple(bar, 'confined');
    expect(inches(development.lengthMm)).toBeCloseTo(numberAt(values, 'expected', 'ld_in'), 2);
    const lap = aciTensionLap({ diameterMm: bar.diameterMm, development, lapClass: 'B' });
    expect(inches(lap.lengthMm)).toBeCloseTo(numberAt(values, 'expected', 'class_B_in'), 2);
  });
});

describe('ACI 318-19 laps', () => {
  topic.check('lap.aci.class', (values) => {
    const factor = (provided: number, share: number) => aciLapClass(provided, share).factor;
    expect(textAt(values, 'A', 'when')).toBe(
      'As provided/required >= 2.0 and <= 50 % spliced within lap length',
    );
    expect(factor(2, 0.5)).toBe(numberAt(values, 'A', 'factor'));
    expect(factor(1.99, 0.5)).toBe(numberAt(values, 'B', 'factor'));
    expect(factor(2, 0.51)).toBe(numberAt(values, 'B', 'factor'));
    const small = aciDevelopmentSimple(aciBar({ dbIn: 0.375, fyPsi: 40_000, fcPsi: 5000 }), 'confined');
    const lap = aciTensionLap({ diameterMm: 0.375 * IN, development: small, lapClass: 'B' });
    expect(inches(lap.lengthMm)).toBeCloseTo(numberAt(values, 'min_in'), 12);
  });

  topic.check('lap.aci.limits', (values) => {
    expect(textAt(values, 'max_bar')).toContain('No. 11');
    const eleven = aciDevelopmentSimple(aciBar({ dbIn: 1.41 }), 'confined');
    expect(() => aciTensionLap({ diameterMm: 1.41 * IN, development: eleven, lapClass: 'B' })).not.toThrow();
    expect(() => aciTensionLap({ diameterMm: 1.693 * IN, development: eleven, lapClass: 'B' })).toThrow(
      /coupler/,
    );

    expect(textAt(values, 'non_contact_transverse')).toBe('<= min(lap/5, 6 in)');
    expect(inches(nonContactLapMost(20 * IN).mostMm)).toBeCloseTo(4, 12);
    expect(inches(nonContactLapMost(48 * IN).mostMm)).toBeCloseTo(6, 12);

    expect(textAt(values, 'compression_lap')).toBe('0.0005 fy db (Grade 60) >= 12 in');
    const compression = (dbIn: number, fcPsi = 4000) =>
      inches(
        aciCompressionLap({ diameterMm: dbIn * IN, fyMPa: psiToMPa(60_000), fcMPa: psiToMPa(fcPsi) })
          .lengthMm,
      );
    expect(compression(1)).toBeCloseTo(30, 9);
    expect(compression(0.375)).toBeCloseTo(12, 9);
    expect(compression(1, 2500)).toBeCloseTo(40, 9);

    expect(textAt(values, 'two_sizes')).toBe('greater of ld of larger and lap of smaller');
    const five = aciDevelopmentSimple(aciBar({ dbIn: 0.625 }), 'confined');
    const two = aciTensionLap({
      diameterMm: 0.625 * IN,
      development: five,
      lapClass: 'B',
      largerBar: { diameterMm: 1.41 * IN, development: eleven },
    });
    expect(two.lengthMm).toBeCloseTo(eleven.lengthMm, 9);
  });
});

describe('EN 1992-1-1', () => {
  topic.checkAll('lap.check.ec2.', (values) => {
    const input = (key: string) => numberAt(values, 'inputs', key);
    const strengthClass = strengthClasses.find((name) => name === textAt(values, 'inputs', 'concrete'));
    expect(strengthClass).toBeDefined();
    const basic = enBasicAnchorage({
      strengthClass: strengthClass ?? 'C12/15',
      diameterMm: input('phi'),
      condition: 'good',
      gammaC: input('gamma_c'),
      alphaCt: input('alpha_ct'),
      sigmaSdMPa: input('sigma_sd'),
      bondVerifiedAboveC60: true,
    });
    expect(basic.fbdMPa).toBeCloseTo(numberAt(values, 'expected', 'fbd'), 9);
    expect(Math.round(basic.lengthMm)).toBe(numberAt(values, 'expected', 'lb_rqd'));
  });

  topic.check('lap.ec2.formula', (values) => {
    const bond = (diameterMm: number, condition: 'good' | 'other') =>
      enBondStrength({ strengthClass: 'C25/30', diameterMm, condition }).fbdMPa;
    expect(bond(16, 'other') / bond(16, 'good')).toBeCloseTo(numberAt(values, 'eta1', 'other'), 12);
    expect(bond(32, 'good')).toBe(bond(16, 'good'));
    expect(bond(40, 'good') / bond(16, 'good')).toBeCloseTo((132 - 40) / 100, 12);
    // l0,min = max(0.3 α6 lb,rqd; 15 φ; 200 mm), each term governing once.
    const lap = (diameterMm: number, sigmaSdMPa: number) =>
      enLapLength({ strengthClass: 'C25/30', diameterMm, condition: 'good', sigmaSdMPa, sharePercent: 25 })
        .lengthMm;
    expect(lap(8, 10)).toBe(200);
    expect(lap(20, 10)).toBe(300);
  });

  topic.check('lap.ec2.alpha6', (values) => {
    expect(enAlpha6Factor(0).alpha6).toBe(numberAt(values, '<25'));
    expect(enAlpha6Factor(25).alpha6).toBe(numberAt(values, '<25'));
    expect(enAlpha6Factor(33).alpha6).toBeCloseTo(numberAt(values, '33'), 12);
    expect(enAlpha6Factor(50).alpha6).toBeCloseTo(numberAt(values, '50'), 12);
    expect(enAlpha6Factor(50.1).alpha6).toBe(numberAt(values, '>50'));
    expect(enAlpha6Factor(100).alpha6).toBe(numberAt(values, '>50'));
    expect(enAlpha6Factor(29).alpha6).toBeCloseTo(1.075, 12);
  });

  topic.check('lap.ec2.stagger', (values) => {
    expect(textAt(values, 'clear_between_lapped')).toBe('<= 4 phi or 50 mm');
    expect(textAt(values, 'longitudinal_between_adjacent_laps')).toBe('>= 0.3 l0');
    expect(textAt(values, 'clear_between_adjacent_laps')).toBe('>= 2 phi and 20 mm');
    const thin = enLapArrangement({ diameterMm: 8, lapMm: 500 });
    expect([thin.mostApartMm, thin.leastStaggerMm, thin.leastBetweenLapsMm]).toEqual([32, 150, 20]);
    const thick = enLapArrangement({ diameterMm: 20, lapMm: 1000 });
    expect([thick.mostApartMm, thick.leastStaggerMm, thick.leastBetweenLapsMm]).toEqual([50, 300, 40]);
  });

  topic.checkAll('lap.check.ec2lap', (values) => {
    const strengthClass = strengthClasses.find((name) => name === textAt(values, 'inputs', 'concrete'));
    const sharePercent = numberAt(values, 'inputs', 'alpha6') === 1.5 ? 100 : 20;
    const lap = enLapLength({
      strengthClass: strengthClass ?? 'C12/15',
      diameterMm: numberAt(values, 'inputs', 'phi'),
      condition: 'good',
      sigmaSdMPa: numberAt(values, 'inputs', 'fyd'),
      sharePercent,
    });
    expect(lap.alpha6).toBe(numberAt(values, 'inputs', 'alpha6'));
    expect(lap.basicMm).toBeCloseTo(numberAt(values, 'expected', 'lb_rqd'), 1);
    expect(lap.lengthMm).toBeCloseTo(numberAt(values, 'expected', 'l0'), 1);
  });
});
