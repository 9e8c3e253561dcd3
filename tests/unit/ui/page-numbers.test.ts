import { describe, expect, it } from 'vitest';
import { pageNumbers } from '@/components/ui/page-numbers';

describe('pageNumbers', () => {
  it('offers first, last and neighbours, and marks what is left out', () => {
    expect(pageNumbers(6, 20)).toEqual([1, null, 5, 6, 7, null, 20]);
  });

  it('never leaves out a single page', () => {
    expect(pageNumbers(4, 7)).toEqual([1, 2, 3, 4, 5, 6, 7]);
    expect(pageNumbers(1, 1)).toEqual([1]);
  });
});
