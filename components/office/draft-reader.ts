import { parseLength } from '@/lib/concrete/length';
import type { FieldProblem } from '@/lib/inspection/app-error';

/** Collects problems under the draft's own field names while text becomes numbers. */
export class DraftReader {
  readonly problems: FieldProblem[] = [];
  constructor(private readonly units: 'mm' | 'in') {}

  /** Millimetres of a typed length; `NaN` after its problem is noted, so that the schema adds none of its own. */
  length(path: string, text: string): number {
    const read = parseLength(text, this.units);
    if (read.ok && read.length.mm !== null) return read.length.mm;
    this.problems.push({ path, message: read.ok ? 'Write the unit too.' : read.problem });
    return Number.NaN;
  }

  optionalLength(path: string, text: string): number | null {
    return text.trim() === '' ? null : this.length(path, text);
  }

  number(path: string, text: string): number {
    const value = text.trim() === '' ? Number.NaN : Number(text.trim().replace(',', '.'));
    if (!Number.isFinite(value)) this.problems.push({ path, message: 'Write a number.' });
    return value;
  }

  /** One of several things; empty text is a problem. */
  choice(path: string, value: string, message: string): string {
    if (value === '') this.problems.push({ path, message });
    return value;
  }

  optionalNumber(path: string, text: string): number | null {
    return text.trim() === '' ? null : this.number(path, text);
  }
}
