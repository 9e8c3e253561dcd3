import { describe, expect, it } from 'vitest';
import { csvText } from '@/components/office/csv-text';

describe('CSV for a spreadsheet', () => {
  it('never hands over a cell that a spreadsheet would run', () => {
    const text = csvText([['=1+1', '+cmd', '@SUM(A1)', '-2+3', '\t=1', '-12.5', '38']]);
    expect(text).toBe("'=1+1,'+cmd,'@SUM(A1),'-2+3,'\t=1,-12.5,38\r\n");
  });

  it('keeps commas, quotes and line ends inside their cell', () => {
    expect(csvText([['a,b', 'say "no"', 'two\nlines']])).toBe('"a,b","say ""no""","two\nlines"\r\n');
  });
});
