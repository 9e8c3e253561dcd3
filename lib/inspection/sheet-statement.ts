import canonicalize from 'canonicalize';
import type { Sheet } from './sheet-types';

/**
 * What a signature and a release stand for, as canonical JSON (RFC 8785): the plan revision and every judged fact in
 * it. Its SHA-256 is the sheet's digest. Signatures, photographs and releases are not in it: they come after.
 */
export function sheetStatement(sheet: Sheet): string {
  const statement = {
    pour: sheet.pourId,
    plan: sheet.plan.revision,
    points: sheet.faces.flatMap((face) =>
      [...face.points, ...face.spots].map((point) => [
        point.key,
        point.mark,
        point.governing.map((reading) => [
          reading.entry.id,
          reading.current?.value?.mm ?? null,
          reading.judged.verdict,
          reading.acceptedBy?.id ?? null,
        ]),
      ]),
    ),
    checks: sheet.checks.map((check) => [
      check.item.id,
      check.governing?.id ?? null,
      check.governing?.body.answer ?? null,
    ]),
    measurements: sheet.measurements.map((state) => [
      state.item.id,
      state.governing.map((place) => [place.entry.id, place.verdict]),
    ]),
    nonconformances: sheet.nonconformances.map((state) => [
      state.entry.id,
      state.status,
      state.disposition?.id ?? null,
    ]),
    conditions: sheet.conditions.map((state) => [state.condition.id, state.verified?.body.outcome ?? null]),
  };
  // `undefined` comes back only for what JSON cannot hold; the statement is built of strings, numbers and null.
  return canonicalize(statement) ?? '';
}
