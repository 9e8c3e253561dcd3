import { describe, expect, it } from 'vitest';
import { dayStarts } from '@/components/drawings/day-starts';

describe('dayStarts', () => {
  it('gives the midnights of the place, not of UTC', () => {
    expect(dayStarts('2026-12-01T12:00:00.000Z', '2026-12-03T12:00:00.000Z', 'America/Halifax')).toEqual([
      '2026-12-02T04:00:00.000Z',
      '2026-12-03T04:00:00.000Z',
    ]);
  });

  it('follows the clocks when they change (Europe/Madrid, 25 October 2026)', () => {
    expect(dayStarts('2026-10-24T12:00:00.000Z', '2026-10-27T00:00:00.000Z', 'Europe/Madrid')).toEqual([
      '2026-10-24T22:00:00.000Z',
      '2026-10-25T23:00:00.000Z',
      '2026-10-26T23:00:00.000Z',
    ]);
  });

  it('includes a day that begins at the first instant', () => {
    expect(dayStarts('2026-12-01T00:00:00.000Z', '2026-12-01T10:00:00.000Z', 'UTC')).toEqual([
      '2026-12-01T00:00:00.000Z',
    ]);
  });
});
