import { notNegative, positive } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { atLeast } from '@/lib/concrete/length';
import { worstFinding, type LimitFinding } from '@/lib/concrete/limit-verdict';
import { apartText, numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, trailSource } from '@/lib/concrete/trail-source';

const c1116 = trailSource('ASTM C1116/C1116M, batch ticket', '', 'memory');

/**
 * Fibres by the batch ticket: type as specified, and the dosage at least what is specified less what the plan permits.
 * A ticket without type or dosage is not verified. Dosages in kg/m³.
 */
export function judgeFibreTicket(
  ticket: { fibreType: string | null; fibreKgPerM3: number | null },
  specified: { fibreType: string; fibreKgPerM3: number; minusPercent: number },
): LimitFinding & { trail: TrailStep[] } {
  const dosage = positive('specified dosage', specified.fibreKgPerM3);
  const minus = notNegative('dosage tolerance', specified.minusPercent);
  if (minus >= 100) throw new ConcreteError('dosage tolerance', 'It is as large as the dosage.');
  if (specified.fibreType.trim() === '') throw new ConcreteError('specified fibre', 'It has no type.');
  const least = dosage * (1 - minus / 100);
  const findings: LimitFinding[] = [];
  if (ticket.fibreType === null || ticket.fibreType.trim() === '') {
    findings.push({ verdict: 'not-verified', side: null, reason: 'The ticket does not name the fibre.' });
  } else if (ticket.fibreType.trim().toLowerCase() !== specified.fibreType.trim().toLowerCase()) {
    const reason = `The ticket names "${ticket.fibreType}", specified is "${specified.fibreType}".`;
    findings.push({ verdict: 'not-met', side: null, reason });
  }
  if (ticket.fibreKgPerM3 === null) {
    findings.push({ verdict: 'not-verified', side: null, reason: 'The ticket does not give the dosage.' });
  } else if (!atLeast(notNegative('dosage on the ticket', ticket.fibreKgPerM3), least)) {
    const [is, limit] = apartText(ticket.fibreKgPerM3, least, 2);
    findings.push({
      verdict: 'not-met',
      side: 'low',
      reason: `Dosage is ${is} kg/m³, less than ${limit} kg/m³.`,
    });
  }
  findings.push({ verdict: 'met', side: null, reason: 'Fibre and dosage as specified.' });
  return {
    ...worstFinding(findings),
    trail: [
      c1116('Fibre type and quantity per volume stand on the ticket', ticket.fibreType ?? 'no type'),
      arithmetic('Least dosage = specified less tolerance', `${numberText(least, 3)} kg/m³`),
    ],
  };
}

/** Fibre dosage from the mass added to a load and the load's volume. */
export function fibreDosage(massKg: number, volumeM3: number): { kgPerM3: number; trail: TrailStep[] } {
  const kgPerM3 = positive('mass of fibres', massKg) / positive('volume of the load', volumeM3);
  const value = `${numberText(massKg)} kg / ${numberText(volumeM3)} m³ = ${numberText(kgPerM3, 3)} kg/m³`;
  return { kgPerM3, trail: [arithmetic('Dosage = mass / volume', value)] };
}
