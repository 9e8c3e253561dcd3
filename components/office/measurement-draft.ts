import type { MeasurementInput } from '@/lib/inspection/measurement-item';
import type { MeasurementKind } from '@/lib/inspection/measurement-kind';
import type { MeasurementRule, RuleOf } from '@/lib/inspection/measurement-rule';
import { measurementRules } from './measurement-words';

type Rule = MeasurementRule['rule'];

/**
 * One measurement as it was typed: every field that any rule asks for, so that choosing another rule loses nothing. Text
 * throughout, for the reasons of `PlanDraft`; names are those that a problem of issuing carries.
 */
export interface MeasurementDraft {
  id: string;
  rule: Rule;
  title: string;
  elementId: string;
  required: string;
  loaded: boolean;
  layerId: string;
  otherLayerId: string;
  faceId: string;
  carriedLayerIds: string[];
  standsOnFaceId: string;
  standsOnLayerIds: string[];
  other: string;
  ownMinus: string;
  ownPlus: string;
  kind: MeasurementKind;
  quantity: 'length' | 'count' | 'share' | 'designation';
  least: string;
  most: string;
  expected: string;
  bayWidth: string;
  edge: string;
  gaps: string;
  steel: RuleOf<'bar-spacing'>['steel'];
  use: RuleOf<'greatest-spacing'>['use'] | '';
  place: RuleOf<'clear-distance'>['place'];
  code: RuleOf<'clear-distance'>['code'];
  by: RuleOf<'support-spacing'>['by'];
  plan: string;
  pattern: RuleOf<'tie-share'>['pattern'];
  sharePercent: string;
  lengthBy: RuleOf<'lap-length'>['length']['by'];
  length: string;
  fyMpa: string;
  fcMpa: string;
  lightweight: boolean;
  topBar: boolean;
  equation: 'simple' | 'general';
  tiesAlongLap: boolean;
  providedOverRequired: string;
  strengthClass: string;
  stressMpa: string;
  goodBond: boolean;
  tensionLap: string;
  tolerance: RuleOf<'lap-length'>['tolerance'];
  lap: string;
  mostPercent: string;
  type: string;
  mostThreads: string;
  starter: boolean;
  bendCode: RuleOf<'bend-diameter'>['code'];
  barUse: 'main' | 'tie';
  angle: '90' | '135' | '180';
  damagedMostPercent: string;
  patchedMostPercent: string;
  height: string;
  from: RuleOf<'tendon-height'>['from'];
  to: RuleOf<'tendon-height'>['to'];
  band: RuleOf<'tendon-height'>['band'];
  fibreType: string;
  kgPerM3: string;
  minusPercent: string;
}

/** A measurement of which only the rule is chosen; codes and bands start with those of the plan's basis. */
export function emptyMeasurement(id: string, rule: Rule, elementId: string, basis: string): MeasurementDraft {
  const european = basis === 'en-1992';
  return {
    id,
    rule,
    title: '',
    elementId,
    required: String(measurementRules[rule].places),
    loaded: false,
    layerId: '',
    otherLayerId: '',
    faceId: '',
    carriedLayerIds: [],
    standsOnFaceId: '',
    standsOnLayerIds: [],
    other: '',
    ownMinus: '',
    ownPlus: '',
    kind: 'bar-spacing',
    quantity: 'length',
    least: '',
    most: '',
    expected: '',
    bayWidth: '',
    edge: '',
    gaps: '10',
    steel: 'slab-or-wall',
    use: '',
    place: 'layer',
    code: european ? 'en-1992-1-1' : 'aci-318-19',
    by: 'common-practice',
    plan: '',
    pattern: 'alternate',
    sharePercent: '',
    lengthBy: 'typed',
    length: '',
    fyMpa: '',
    fcMpa: '',
    lightweight: false,
    topBar: false,
    equation: 'simple',
    tiesAlongLap: false,
    providedOverRequired: '1',
    strengthClass: '',
    stressMpa: '',
    goodBond: true,
    tensionLap: '',
    tolerance: 'basis',
    lap: '',
    mostPercent: '',
    type: '',
    mostThreads: '',
    starter: true,
    bendCode: european ? 'en-1992-1-1' : 'aci-318-19',
    barUse: 'main',
    angle: '90',
    damagedMostPercent: '',
    patchedMostPercent: '',
    height: '',
    from: 'soffit',
    to: 'centre',
    band: basis === 'as-3600' ? 'as-3600' : 'aci-117-10',
    fibreType: '',
    kgPerM3: '',
    minusPercent: '0',
  };
}

type Show = (mm: number) => string;
const text = (value: number | null): string => (value === null ? '' : String(value));

/** A measurement of an issued plan as it was typed. */
export function measurementDraftOf(item: MeasurementInput, basis: string, shown: Show): MeasurementDraft {
  const { rule } = item;
  return {
    ...emptyMeasurement(item.id, rule.rule, item.elementId, basis),
    title: item.title,
    required: String(item.required),
    loaded: item.loaded,
    ...typedOf(rule, shown),
  };
}

function typedOf(rule: MeasurementRule, shown: Show): Partial<MeasurementDraft> {
  const mm = (value: number | null) => (value === null ? '' : shown(value));
  const own = (band: { minus: number; plus: number } | null) => ({
    ownMinus: mm(band?.minus ?? null),
    ownPlus: mm(band?.plus ?? null),
  });
  switch (rule.rule) {
    case 'typed':
      return typedLimits(rule, mm);
    case 'bar-size':
    case 'stainless-contact':
      return { layerId: rule.layerId };
    case 'bar-count':
      return {
        layerId: rule.layerId,
        bayWidth: mm(rule.bay?.widthMm ?? null),
        edge: mm(rule.bay?.edgeMm ?? null),
      };
    case 'bar-spacing': {
      const { layerId, steel, use } = rule;
      return { layerId, gaps: String(rule.gaps), steel, use: use ?? '', ...own(rule.ownMm) };
    }
    case 'greatest-spacing':
      return { layerId: rule.layerId, use: rule.use };
    case 'clear-distance':
      return { layerId: rule.layerId, place: rule.place, code: rule.code };
    case 'support-height':
      return {
        faceId: rule.faceId,
        carriedLayerIds: rule.carriedLayerIds,
        standsOnFaceId: rule.standsOn.faceId ?? '',
        standsOnLayerIds: rule.standsOn.layerIds,
        other: rule.standsOn.otherMm === 0 ? '' : shown(rule.standsOn.otherMm),
        ownMinus: mm(rule.ownMinusMm),
      };
    case 'support-spacing':
      return { layerId: rule.layerId, by: rule.by, plan: mm(rule.planMm) };
    case 'tie-share': {
      const { layerId, otherLayerId, pattern, sharePercent } = rule;
      return { layerId, otherLayerId, pattern, sharePercent: text(sharePercent) };
    }
    case 'lap-length': {
      const { layerId, tolerance } = rule;
      return { layerId, tolerance, ownMinus: mm(rule.ownMinusMm), ...lapOf(rule.length, mm) };
    }
    case 'lap-stagger':
      return { lap: shown(rule.lapMm), least: mm(rule.leastMm) };
    case 'share-lapped':
      return { lap: shown(rule.lapMm), code: rule.code, mostPercent: String(rule.mostPercent) };
    case 'coupler':
      return { type: rule.type, mostThreads: text(rule.mostThreads) };
    case 'embedment': {
      const { layerId, tolerance, starter } = rule;
      return { layerId, tolerance, starter, ownMinus: mm(rule.ownMinusMm), length: shown(rule.lengthMm) };
    }
    case 'bend-diameter':
      return { layerId: rule.layerId, bendCode: rule.code, barUse: rule.use };
    case 'hook-extension':
      return { layerId: rule.layerId, barUse: rule.use, angle: `${rule.angle}` };
    case 'coating-damage':
      return {
        layerId: rule.layerId,
        damagedMostPercent: text(rule.damagedMostPercent),
        patchedMostPercent: text(rule.patchedMostPercent),
      };
    case 'frp-damage':
      return { layerId: rule.layerId, mostPercent: text(rule.mostPercent) };
    case 'tendon-height': {
      const { from, to, band } = rule;
      return { height: shown(rule.heightMm), from, to, band, ...own(rule.ownMm) };
    }
    case 'fibre-dosage':
      return {
        fibreType: rule.fibreType,
        kgPerM3: String(rule.kgPerM3),
        minusPercent: String(rule.minusPercent),
      };
  }
}

function typedLimits(
  { kind, quantity, least, most, expected }: RuleOf<'typed'>,
  mm: (value: number | null) => string,
): Partial<MeasurementDraft> {
  const show = quantity === 'length' ? mm : text;
  const simple = (['length', 'count', 'share', 'designation'] as const).find((one) => one === quantity);
  return {
    kind,
    ...(simple ? { quantity: simple } : {}),
    least: show(least),
    most: show(most),
    expected: expected ?? '',
  };
}

function lapOf(
  length: RuleOf<'lap-length'>['length'],
  mm: (value: number | null) => string,
): Partial<MeasurementDraft> {
  switch (length.by) {
    case 'typed':
      return { lengthBy: 'typed', length: mm(length.lengthMm) };
    case 'aci-tension': {
      const { lightweight, topBar, equation, tiesAlongLap } = length;
      return {
        lengthBy: 'aci-tension',
        fyMpa: String(length.fyMpa),
        fcMpa: String(length.fcMpa),
        providedOverRequired: String(length.providedOverRequired),
        sharePercent: String(length.sharePercent),
        lightweight,
        topBar,
        equation,
        tiesAlongLap,
      };
    }
    case 'aci-compression':
      return {
        lengthBy: 'aci-compression',
        fyMpa: String(length.fyMpa),
        fcMpa: String(length.fcMpa),
        tensionLap: mm(length.tensionLapMm),
      };
    case 'en':
      return {
        lengthBy: 'en',
        strengthClass: length.strengthClass,
        stressMpa: String(length.stressMpa),
        sharePercent: String(length.sharePercent),
        goodBond: length.goodBond,
      };
  }
}
