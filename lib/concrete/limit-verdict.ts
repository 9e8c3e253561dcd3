import { finite } from '@/lib/concrete/check-input';
import {
  judgeLimits,
  type JudgedMeasurement,
  type Limits,
  type MeasureUnit,
  type Verdict,
} from '@/lib/concrete/judge-measurement';

/** A verdict with the words that explain it; `side` says which limit was missed. */
export interface LimitFinding {
  verdict: Verdict;
  side: JudgedMeasurement['side'];
  reason: string;
}

/**
 * A named value against its limits: the comparison of `judgeLimits`, with the value's name in front of the reason.
 * @param what the name of the value: "Clear distance"
 * @throws ConcreteError where the value is no number
 */
export function againstLimits(
  what: string,
  value: number,
  limits: Limits,
  unit: MeasureUnit = 'mm',
): LimitFinding {
  const { verdict, side, reason } = judgeLimits(finite(what, value), limits, unit);
  return { verdict, side, reason: `${what}: ${reason}` };
}

/** The least favourable of several findings: one that is not met governs, then one that is not verified. */
export function worstFinding(findings: readonly LimitFinding[]): LimitFinding {
  const worst =
    findings.find((finding) => finding.verdict === 'not-met') ??
    findings.find((finding) => finding.verdict === 'not-verified') ??
    findings[0];
  return worst ?? { verdict: 'not-verified', side: null, reason: 'Nothing was measured.' };
}
