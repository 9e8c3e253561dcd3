/** One line of the table: what was done, how it went, and against what. */
export interface Row {
  work: string;
  measured: string;
  /** What it is held against, measured in the same run. */
  peer: string;
  ratio: string;
  target: string;
  /** Null where there is no target. */
  reached: boolean | null;
}

/** Three significant figures at most, without an exponent. */
export function figure(value: number): string {
  if (!Number.isFinite(value)) return 'not measured';
  const digits = Math.abs(value) >= 100 ? 0 : Math.abs(value) >= 10 ? 1 : 2;
  return value.toLocaleString('en-GB', { maximumFractionDigits: digits });
}

/** The middle one, so that a moment of somebody else's work on this machine does not count. */
export function median(values: readonly number[]): number {
  if (values.length === 0) return Number.NaN;
  const sorted = [...values].sort((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  const upper = sorted[middle] ?? Number.NaN;
  return sorted.length % 2 === 1 ? upper : (upper + (sorted[middle - 1] ?? upper)) / 2;
}

/** The value that this share of all values does not exceed. @param share 0 to 1 */
export function percentile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(share * sorted.length) - 1)] ?? Number.NaN;
}

/** Ours and a peer's in the same unit, more being better: the ratio has to be at least the target. */
export function ratioRow(of: {
  work: string;
  unit: string;
  ours: number;
  peer: number;
  peerName: string;
  atLeast: number;
}): Row {
  const ratio = of.ours / of.peer;
  return {
    work: of.work,
    measured: `${figure(of.ours)} ${of.unit}`,
    peer: `${of.peerName} ${figure(of.peer)} ${of.unit}`,
    ratio: figure(ratio),
    target: `at least ${of.atLeast}`,
    reached: Number.isFinite(ratio) ? ratio >= of.atLeast : null,
  };
}

/** A value that is to stay at or below a limit. */
export function limitRow(of: {
  work: string;
  unit: string;
  value: number;
  most: number;
  note?: string;
}): Row {
  return {
    work: of.work,
    measured: `${figure(of.value)} ${of.unit}`,
    peer: of.note ?? '',
    ratio: '',
    target: `at most ${of.most} ${of.unit}`,
    reached: of.value <= of.most,
  };
}
