import { expect, test } from 'vitest';
import { instantOfField, localFieldText, timeAway } from '@/components/field/field-time';

const zone = 'America/Halifax';

test("a time typed on site is the project's time, in winter and in summer", () => {
  expect(instantOfField('2026-12-02T06:30', zone)).toBe('2026-12-02T10:30:00.000Z');
  expect(instantOfField('2026-07-02T06:30', zone)).toBe('2026-07-02T09:30:00.000Z');
  expect(localFieldText('2026-12-02T10:30:00.000Z', zone)).toBe('2026-12-02T06:30');
});

test('a time that summer time skips is refused, and one that comes twice is the earlier', () => {
  expect(instantOfField('2026-03-08T02:30', zone)).toBeNull();
  expect(instantOfField('2026-11-01T01:30', zone)).toBe('2026-11-01T04:30:00.000Z');
});

test('nothing typed is no time', () => {
  expect(instantOfField('', zone)).toBeNull();
});

test('how far away, in words', () => {
  const now = Date.parse('2026-12-01T12:00:00.000Z');
  expect(timeAway('2026-12-01T15:20:00.000Z', now)).toBe('in 3 h 20 min');
  expect(timeAway('2026-12-01T11:45:00.000Z', now)).toBe('15 min ago');
  expect(timeAway('2026-12-05T12:00:00.000Z', now)).toBe('in 4 days');
});
