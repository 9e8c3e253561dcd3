import { ConcreteError } from '@/lib/concrete/concrete-error';
import { formatLength, type LengthUnit } from '@/lib/concrete/length';
import { fromContract } from '@/lib/concrete/trail-source';
import {
  issueBarSize,
  issueBarCount,
  issueBarSpacing,
  issueClearDistance,
  issueGreatestSpacing,
} from './issue-bars';
import { issueBend, issueHook } from './issue-bends';
import { issueCoating, issueFibres, issueFrp, issueStainlessContact } from './issue-materials';
import { issueCoupler, issueEmbedment, issueLap, issueShareLapped, issueStagger } from './issue-laps';
import { issueSupportHeight, issueSupportSpacing, issueTendonHeight, issueTies } from './issue-supports';
import type { IssuedLimits, MeasurementContext } from './measurement-context';
import type { MeasurementInput, MeasurementItem } from './measurement-item';
import type { RuleOf } from './measurement-rule';

/**
 * Computes the limits of one measurement from the plan's data and freezes them with their trail.
 * @throws ConcreteError with the field of the measurement and the reason
 */
export function issueMeasurement(item: MeasurementInput, context: MeasurementContext): MeasurementItem {
  const { against, ...limits } = limitsOf(item, context);
  return {
    id: item.id,
    title: item.title,
    elementId: item.elementId,
    required: item.required,
    loaded: item.loaded,
    ...limits,
    ...(against ? { against } : {}),
    rule: item.rule,
  };
}

function limitsOf({ rule }: MeasurementInput, context: MeasurementContext): IssuedLimits {
  switch (rule.rule) {
    case 'typed':
      return issueTyped(rule, context.units);
    case 'bar-size':
      return issueBarSize(rule, context);
    case 'bar-count':
      return issueBarCount(rule, context);
    case 'bar-spacing':
      return issueBarSpacing(rule, context);
    case 'greatest-spacing':
      return issueGreatestSpacing(rule, context);
    case 'clear-distance':
      return issueClearDistance(rule, context);
    case 'support-height':
      return issueSupportHeight(rule, context);
    case 'support-spacing':
      return issueSupportSpacing(rule, context);
    case 'tie-share':
      return issueTies(rule, context);
    case 'lap-length':
      return issueLap(rule, context);
    case 'lap-stagger':
      return issueStagger(rule, context);
    case 'share-lapped':
      return issueShareLapped(rule, context);
    case 'coupler':
      return issueCoupler(rule);
    case 'embedment':
      return issueEmbedment(rule, context);
    case 'bend-diameter':
      return issueBend(rule, context);
    case 'hook-extension':
      return issueHook(rule, context);
    case 'coating-damage':
      return issueCoating(rule, context);
    case 'frp-damage':
      return issueFrp(rule, context);
    case 'stainless-contact':
      return issueStainlessContact(rule, context);
    case 'tendon-height':
      return issueTendonHeight(rule, context);
    case 'fibre-dosage':
      return issueFibres(rule);
  }
}

function issueTyped(rule: RuleOf<'typed'>, units: LengthUnit): IssuedLimits {
  const { kind, quantity, least, most, expected } = rule;
  if (quantity === 'designation') {
    if (!expected) throw new ConcreteError('expected', 'Write the bar that is planned.', 'absent');
  } else if (least === null && most === null) {
    throw new ConcreteError(
      'least',
      'Give a least or a most: without a limit nothing can be judged.',
      'absent',
    );
  }
  if (least !== null && most !== null && least > most)
    throw new ConcreteError('most', 'The most accepted is less than the least accepted.');
  const trail = [fromContract('Limits typed for this plan', typedWords(rule, units))];
  return { kind, quantity, least, most, expected, trail };
}

function typedWords({ quantity, least, most, expected }: RuleOf<'typed'>, units: LengthUnit): string {
  if (expected) return expected;
  const unit = quantity === 'length' ? ` ${units}` : quantity === 'share' ? ' %' : '';
  const shown = (limit: number) => (quantity === 'length' ? formatLength(limit, units) : String(limit));
  if (least !== null && most !== null) return `${shown(least)} to ${shown(most)}${unit}`;
  if (least !== null) return `at least ${shown(least)}${unit}`;
  return most === null ? '' : `at most ${shown(most)}${unit}`;
}
