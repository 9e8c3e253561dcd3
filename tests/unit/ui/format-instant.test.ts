import { describe, expect, it } from 'vitest';
import { formatInstant } from '@/components/ui/format-instant';

describe('formatInstant', () => {
  it('writes the time of the place', () => {
    expect(formatInstant('2026-12-02T10:30:00.000Z', 'America/Halifax', 'full')).toBe(
      'Wed 2 Dec 2026, 06:30',
    );
    expect(formatInstant('2026-12-02T02:30:00.000Z', 'America/Halifax', 'short')).toBe('Tue 1 Dec 22:30');
    expect(formatInstant('2026-12-02T02:30:00.000Z', 'America/Halifax', 'day')).toBe('Tue 1');
    expect(formatInstant('2026-12-02T02:30:00.000Z', 'America/Halifax', 'date')).toBe('1 Dec 2026');
  });

  it('writes midnight as 00:00', () => {
    expect(formatInstant('2026-12-02T04:00:00.000Z', 'America/Halifax', 'time')).toBe('00:00');
  });

  it('shows what it cannot read as it is', () => {
    expect(formatInstant('yesterday', 'UTC')).toBe('yesterday');
  });
});
