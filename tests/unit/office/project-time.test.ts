import { describe, expect, it } from 'vitest';
import { dayAndTime, instantFromField, localFieldText, timeAway } from '@/components/office/project-time';

describe("the project's time", () => {
  it('reads a field in the zone of the project, summer and winter', () => {
    expect(instantFromField('2026-07-01T06:30', 'America/New_York')).toBe('2026-07-01T10:30:00.000Z');
    expect(instantFromField('2026-12-02T06:30', 'America/New_York')).toBe('2026-12-02T11:30:00.000Z');
    expect(instantFromField('2026-12-02T06:30', 'Pacific/Auckland')).toBe('2026-12-01T17:30:00.000Z');
  });

  it('refuses a time that summer time skips, and takes the earlier of two', () => {
    expect(instantFromField('2026-03-08T02:30', 'America/New_York')).toBeNull();
    expect(instantFromField('2026-11-01T01:30', 'America/New_York')).toBe('2026-11-01T05:30:00.000Z');
    expect(instantFromField('tomorrow', 'America/New_York')).toBeNull();
  });

  it('shows in a field what was read from it', () => {
    const zone = 'Asia/Kathmandu';
    const read = instantFromField('2026-02-03T04:05', zone);
    expect(read).not.toBeNull();
    expect(localFieldText(read ?? '', zone)).toBe('2026-02-03T04:05');
  });

  it('says day and time as people on site do', () => {
    expect(dayAndTime('2026-12-02T11:30:00.000Z', 'America/New_York')).toBe('Wed 2 Dec 06:30');
    expect(timeAway('2026-12-02T11:30:00.000Z', '2026-12-01T20:30:00.000Z')).toBe('in 15 h');
    expect(timeAway('2026-12-02T11:30:00.000Z', '2026-12-02T12:00:00.000Z')).toBe('30 min ago');
  });
});
