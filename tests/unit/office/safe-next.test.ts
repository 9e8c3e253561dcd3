import { describe, expect, it } from 'vitest';
import { safeNext } from '@/components/office/safe-next';

describe('where a person goes after signing in', () => {
  it('follows a path of this program', () => {
    expect(safeNext('/pours/1?face=a#record')).toBe('/pours/1?face=a#record');
    expect(safeNext('/field/pours/1')).toBe('/field/pours/1');
  });

  it.each([
    '//evil.example.test',
    'https://evil.example.test',
    '/\\evil.example.test',
    '/\t/evil.example.test',
    'javascript:1',
    '',
    null,
  ])('does not follow %j', (next) => {
    expect(safeNext(next)).toBe('/');
  });

  it('does not lead back to signing in', () => {
    expect(safeNext('/sign-in?next=/pours')).toBe('/');
  });
});
