import type { MeasurementInput } from '@/lib/inspection/measurement-item';
import type { MeasurementRule, RuleOf } from '@/lib/inspection/measurement-rule';
import type { DraftReader } from './draft-reader';
import type { MeasurementDraft } from './measurement-draft';
import { measurementRules } from './measurement-words';
import type { ElementDraft } from './plan-draft';

/** What the form says of one measurement; problems are noted by the reader under the draft's own field names. */
export function readMeasurement(
  reader: DraftReader,
  at: string,
  draft: MeasurementDraft,
  elements: readonly ElementDraft[],
): MeasurementInput {
  const read = new MeasurementReader(reader, at, draft);
  return {
    id: draft.id,
    title: draft.title.trim() || defaultTitle(draft, elements),
    elementId: read.choose('elementId', 'Choose the element.'),
    required: reader.number(`${at}.required`, draft.required),
    loaded: canBeLoaded(draft) && draft.loaded,
    rule: read.rule(),
  };
}

/** Only a height or a spacing means something under a person's weight. */
export const canBeLoaded = ({ rule, quantity }: Pick<MeasurementDraft, 'rule' | 'quantity'>): boolean =>
  rule === 'support-height' || (rule === 'typed' && quantity === 'length');

/** "Laps of T1": what a measurement without a title is called. */
export function defaultTitle(draft: MeasurementDraft, elements: readonly ElementDraft[]): string {
  const { name } = measurementRules[draft.rule];
  const layer = elements
    .find((element) => element.id === draft.elementId)
    ?.layers.find((one) => one.id === draft.layerId);
  return layer?.name ? `${name} of ${layer.name}` : name;
}

class MeasurementReader {
  constructor(
    private readonly reader: DraftReader,
    private readonly at: string,
    private readonly draft: MeasurementDraft,
  ) {}

  private path(field: keyof MeasurementDraft): string {
    return `${this.at}.${field}`;
  }

  choose<F extends 'elementId' | 'layerId' | 'otherLayerId' | 'faceId' | 'use'>(
    field: F,
    message: string,
  ): MeasurementDraft[F] {
    this.reader.choice(this.path(field), this.draft[field], message);
    return this.draft[field];
  }

  private mm(field: TextField): number {
    return this.reader.length(this.path(field), this.draft[field]);
  }

  private maybeMm(field: TextField): number | null {
    return this.reader.optionalLength(this.path(field), this.draft[field]);
  }

  private number(field: TextField): number {
    return this.reader.number(this.path(field), this.draft[field]);
  }

  private maybe(field: TextField): number | null {
    return this.reader.optionalNumber(this.path(field), this.draft[field]);
  }

  private layer(): string {
    return this.choose('layerId', 'Choose the layer.');
  }

  /** A minus and a plus of the contract's own; both empty: those of the basis. */
  private own(): { minus: number; plus: number } | null {
    const { ownMinus, ownPlus } = this.draft;
    if (ownMinus.trim() === '' && ownPlus.trim() === '') return null;
    return { minus: this.mm('ownMinus'), plus: this.mm('ownPlus') };
  }

  rule(): MeasurementRule {
    const { draft } = this;
    switch (draft.rule) {
      case 'typed':
        return this.typed();
      case 'bar-size':
      case 'stainless-contact':
        return { rule: draft.rule, layerId: this.layer() };
      case 'bar-count': {
        const widthMm = this.maybeMm('bayWidth');
        const bay = widthMm === null ? null : { widthMm, edgeMm: this.maybeMm('edge') ?? 0 };
        return { rule: 'bar-count', layerId: this.layer(), bay };
      }
      case 'bar-spacing':
        return {
          rule: 'bar-spacing',
          layerId: this.layer(),
          gaps: this.number('gaps'),
          ownMm: this.own(),
          steel: draft.steel,
          use: draft.use === '' ? null : draft.use,
        };
      case 'greatest-spacing': {
        const use = this.choose('use', 'Choose what the bars do: the limit depends on it.');
        return { rule: 'greatest-spacing', layerId: this.layer(), use: use === '' ? 'wall' : use };
      }
      case 'clear-distance': {
        const { place, code } = draft;
        return { rule: 'clear-distance', layerId: this.layer(), place, code };
      }
      case 'support-height':
        return this.supportHeight();
      case 'support-spacing': {
        const planMm = draft.by === 'plan' ? this.mm('plan') : null;
        return { rule: 'support-spacing', layerId: this.layer(), by: draft.by, planMm };
      }
      case 'tie-share': {
        const otherLayerId = this.choose('otherLayerId', 'Choose the layer that crosses it.');
        const sharePercent = draft.pattern === 'share' ? this.number('sharePercent') : null;
        const { pattern } = draft;
        return { rule: 'tie-share', layerId: this.layer(), otherLayerId, pattern, sharePercent };
      }
      case 'lap-length':
        return { rule: 'lap-length', layerId: this.layer(), ...this.tolerance(), length: this.lapLength() };
      case 'lap-stagger':
        return { rule: 'lap-stagger', lapMm: this.mm('lap'), leastMm: this.maybeMm('least') };
      case 'share-lapped': {
        const mostPercent = this.number('mostPercent');
        return { rule: 'share-lapped', lapMm: this.mm('lap'), code: draft.code, mostPercent };
      }
      case 'coupler':
        return { rule: 'coupler', type: draft.type, mostThreads: this.maybe('mostThreads') };
      case 'embedment':
        return {
          rule: 'embedment',
          layerId: this.layer(),
          ...this.tolerance(),
          lengthMm: this.mm('length'),
          starter: draft.starter,
        };
      case 'bend-diameter':
        return { rule: 'bend-diameter', layerId: this.layer(), code: draft.bendCode, use: draft.barUse };
      case 'hook-extension': {
        const angle = angles[draft.angle];
        return { rule: 'hook-extension', layerId: this.layer(), use: draft.barUse, angle };
      }
      case 'coating-damage':
        return {
          rule: 'coating-damage',
          layerId: this.layer(),
          damagedMostPercent: this.maybe('damagedMostPercent'),
          patchedMostPercent: this.maybe('patchedMostPercent'),
        };
      case 'frp-damage':
        return { rule: 'frp-damage', layerId: this.layer(), mostPercent: this.maybe('mostPercent') };
      case 'tendon-height': {
        const { from, to, band } = draft;
        const ownMm = band === 'own' ? this.own() : null;
        return { rule: 'tendon-height', heightMm: this.mm('height'), from, to, band, ownMm };
      }
      case 'fibre-dosage': {
        const kgPerM3 = this.number('kgPerM3');
        const minusPercent = this.maybe('minusPercent') ?? 0;
        return { rule: 'fibre-dosage', fibreType: draft.fibreType, kgPerM3, minusPercent };
      }
    }
  }

  private typed(): RuleOf<'typed'> {
    const { kind, quantity, expected } = this.draft;
    const limit = (field: 'least' | 'most') =>
      quantity === 'length' ? this.maybeMm(field) : this.maybe(field);
    const isBar = quantity === 'designation';
    return {
      rule: 'typed',
      kind,
      quantity,
      least: isBar ? null : limit('least'),
      most: isBar ? null : limit('most'),
      expected: isBar ? expected : null,
    };
  }

  private supportHeight(): RuleOf<'support-height'> {
    const { carriedLayerIds, standsOnFaceId, standsOnLayerIds } = this.draft;
    if (carriedLayerIds.length === 0)
      this.reader.choice(this.path('carriedLayerIds'), '', 'Tick the layers that it carries.');
    return {
      rule: 'support-height',
      faceId: this.choose('faceId', 'Choose the upper face.'),
      carriedLayerIds,
      standsOn: {
        faceId: standsOnFaceId === '' ? null : standsOnFaceId,
        layerIds: standsOnLayerIds,
        otherMm: this.maybeMm('other') ?? 0,
      },
      ownMinusMm: this.maybeMm('ownMinus'),
    };
  }

  private tolerance(): Pick<RuleOf<'lap-length'>, 'tolerance' | 'ownMinusMm'> {
    const { tolerance } = this.draft;
    return { tolerance, ownMinusMm: tolerance === 'own' ? this.mm('ownMinus') : null };
  }

  private lapLength(): RuleOf<'lap-length'>['length'] {
    const { lengthBy, lightweight, topBar, equation, tiesAlongLap, goodBond, strengthClass } = this.draft;
    switch (lengthBy) {
      case 'typed':
        return { by: 'typed', lengthMm: this.mm('length') };
      case 'aci-tension':
        return {
          by: 'aci-tension',
          fyMpa: this.number('fyMpa'),
          fcMpa: this.number('fcMpa'),
          lightweight,
          topBar,
          equation,
          tiesAlongLap,
          providedOverRequired: this.number('providedOverRequired'),
          sharePercent: this.number('sharePercent'),
        };
      case 'aci-compression':
        return {
          by: 'aci-compression',
          fyMpa: this.number('fyMpa'),
          fcMpa: this.number('fcMpa'),
          tensionLapMm: this.maybeMm('tensionLap'),
        };
      case 'en':
        return {
          by: 'en',
          strengthClass,
          stressMpa: this.number('stressMpa'),
          sharePercent: this.number('sharePercent'),
          goodBond,
        };
    }
  }
}

type TextField = {
  [F in keyof MeasurementDraft]: MeasurementDraft[F] extends string
    ? string extends MeasurementDraft[F]
      ? F
      : never
    : never;
}[keyof MeasurementDraft];

const angles = { '90': 90, '135': 135, '180': 180 } as const;
