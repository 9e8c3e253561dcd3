import { unknownChoice, whole } from '@/lib/concrete/check-input';
import { noFlameCutting } from '@/lib/concrete/coatings';
import type { LimitFinding } from '@/lib/concrete/limit-verdict';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

export type BarMaterial = 'epoxy' | 'frp' | 'stainless';

/**
 * What a material asks for beside its damage rule, as questions for the checklist, each with where it comes from.
 */
export function materialRules(material: BarMaterial): TrailStep[] {
  switch (material) {
    case 'epoxy': {
      const provisions = trailSource('CRSI suggested provisions; Maryland SHA 421', '', 'seen');
      return [
        provisions('Ties', 'nylon, epoxy- or plastic-coated wire'),
        provisions('Supports', 'coated or non-metallic'),
        noFlameCutting('Cutting', 'saw or shear, then patch; no flame cutting'),
      ];
    }
    case 'frp': {
      const aci = trailSource('ACI 440.5, 2.1.3 and 3.2', '2008', 'partly-seen');
      const bending = trailSource('ACI 440.5, 3.2', '2008', 'seen');
      const flotation = trailSource('ACI 440.5, 3.2', '2008', 'memory');
      const meter = trailSource('Florida DOT, FRP reinforcing', '', 'seen');
      return [
        bending('Field bending', 'none; bends are made in the factory before the bar cures, no heating'),
        aci('Ties', 'plastic, nylon or coated wire'),
        aci('Supports', 'non-metallic or coated'),
        flotation('Flotation', 'the mat is tied down'),
        meter(
          'Cover meter',
          'magnetic and radar meters do not see FRP: cover is read before the pour, or never',
        ),
      ];
    }
    case 'stainless': {
      const practice = trailSource('state agencies’ practice', '', 'memory');
      return [
        practice('Ties', 'stainless, coated or non-metallic'),
        practice('Supports', 'stainless or non-metallic'),
        practice('Contact with carbon steel', 'none where specified: 1 in apart, or a sleeve'),
      ];
    }
    default:
      throw unknownChoice('material', material);
  }
}

/** Whether an instrument sees a bar at all: a magnetic meter reads nothing over FRP and little over stainless steel. */
export function instrumentSees(
  instrument: 'tape' | 'gauge-block' | 'magnetic' | 'radar',
  material: 'steel' | 'epoxy' | 'galvanised' | 'stainless' | 'frp',
): { sees: boolean; reason: string } {
  if (instrument === 'tape' || instrument === 'gauge-block')
    return { sees: true, reason: 'Read by hand before the pour.' };
  if (material === 'frp') return { sees: false, reason: 'This kind of meter does not see FRP.' };
  if (material === 'stainless' && instrument === 'magnetic') {
    return { sees: false, reason: 'A magnetic meter does not see austenitic stainless steel reliably.' };
  }
  return { sees: true, reason: 'The meter sees this bar.' };
}

/** Contact of stainless with carbon steel, counted on the site, where the contract forbids it. */
export function judgeStainlessContact(found: { contactsFound: number; forbidden: boolean }): LimitFinding {
  const contacts = whole('contacts', found.contactsFound, 0);
  if (!found.forbidden)
    return { verdict: 'met', side: null, reason: 'The contract does not forbid contact.' };
  return contacts === 0
    ? { verdict: 'met', side: null, reason: 'No carbon steel touches stainless steel.' }
    : {
        verdict: 'not-met',
        side: 'high',
        reason: `Carbon steel touches stainless steel at ${contacts} places.`,
      };
}
