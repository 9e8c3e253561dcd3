import { hookExtension, leastBendDiameter } from '@/lib/concrete/bends';
import { atFields, layerOf, limits, type IssuedLimits, type MeasurementContext } from './measurement-context';
import type { RuleOf } from './measurement-rule';

const fields = { 'bar diameter': 'layerId', 'hook angle': 'angle' };

/** Least inside diameter of a bend, by bar and use. */
export function issueBend(rule: RuleOf<'bend-diameter'>, context: MeasurementContext): IssuedLimits {
  const { barDiameterMm } = layerOf(context, rule.layerId);
  const { leastMm, trail } = atFields(fields, () =>
    leastBendDiameter({ basis: rule.code, use: rule.use, diameterMm: barDiameterMm, showIn: context.units }),
  );
  return limits({ kind: 'bend-diameter', quantity: 'length', least: leastMm, trail });
}

/** Straight extension past the bend of a standard hook (ACI 318-19 Tables 25.3.1 and 25.3.2). */
export function issueHook(rule: RuleOf<'hook-extension'>, context: MeasurementContext): IssuedLimits {
  const { barDiameterMm } = layerOf(context, rule.layerId);
  const { leastMm, trail } = atFields(fields, () =>
    hookExtension({ use: rule.use, angle: rule.angle, diameterMm: barDiameterMm, showIn: context.units }),
  );
  return limits({ kind: 'hook-extension', quantity: 'length', least: leastMm, trail });
}
