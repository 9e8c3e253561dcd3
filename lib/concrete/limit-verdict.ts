import { finite } from '@/lib/concrete/check-input';
import { atLeast, atMost } from '@/lib/concrete/length';
import { apartText } from '@/lib/concrete/number-text';

/** How a measured value stands against its limits. Not verified counts neither way. */
export type LimitVerdict = 'met' | 'not-met' | 'not-verified';

/** A verdict with the words that explain it; `side` says which limit was missed. */
export interface LimitFinding {
  verdict: LimitVerdict;
  side: 'low' | 'high' | null;
  reason: string;
}

/**
 * A value against a least and a most, both inclusive, unrounded, with the slack of 1e-6 that every comparison has.
 * @param what the name of the value in a sentence: "Clear distance"
 * @param unit the unit shown behind the numbers: "mm", "%", or "" for counts
 */
export function againstLimits(
  what: string,
  value: number,
  limits: { least?: number | null; most?: number | null },
  unit = 'mm',
): LimitFinding {
  finite(what, value);
  const { least, most } = limits;
  const shown = (limit: number) => apartText(value, limit).map((text) => (unit ? `${text} ${unit}` : text));
  if (least != null && !atLeast(value, finite(`${what}, least`, least))) {
    const [is, limit] = shown(least);
    return { verdict: 'not-met', side: 'low', reason: `${what} is ${is}, less than ${limit}.` };
  }
  if (most != null && !atMost(value, finite(`${what}, most`, most))) {
    const [is, limit] = shown(most);
    return { verdict: 'not-met', side: 'high', reason: `${what} is ${is}, more than ${limit}.` };
  }
  if (least == null && most == null) {
    return { verdict: 'not-verified', side: null, reason: `${what} has no limit to be judged by.` };
  }
  return { verdict: 'met', side: null, reason: `${what} is within its limits.` };
}

/** The least favourable of several findings: one that is not met governs, then one that is not verified. */
export function worstFinding(findings: readonly LimitFinding[]): LimitFinding {
  const worst =
    findings.find((finding) => finding.verdict === 'not-met') ??
    findings.find((finding) => finding.verdict === 'not-verified') ??
    findings[0];
  return worst ?? { verdict: 'not-verified', side: null, reason: 'Nothing was measured.' };
}
