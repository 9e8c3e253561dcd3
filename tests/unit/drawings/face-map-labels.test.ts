import { describe, expect, it } from 'vitest';
import { labelSides } from '@/components/drawings/face-map-labels';

const face = { widthMm: 7200, heightMm: 4000, aspect: 1.8 };
const at = (id: string, xMm: number, yMm: number) => ({ id, label: id, xMm, yMm });

describe('the label of a point on a face map', () => {
  it('stands above and to the right where nothing is in its way', () => {
    expect(labelSides([at('A1', 3000, 2000)], face).get('A1')).toEqual({ x: 1, y: -1 });
  });

  it('stays on the face at its right and at its upper edge', () => {
    const sides = labelSides([at('A5', 7100, 1000), at('C1', 1000, 3950), at('C5', 7150, 3980)], face);
    expect(sides.get('A5')?.x).toBe(-1);
    expect(sides.get('C1')?.y).toBe(1);
    expect(sides.get('C5')).toEqual({ x: -1, y: 1 });
  });

  it('is not written over the mark of the next point, nor over its label', () => {
    const sides = labelSides([at('B2', 2800, 1600), at('B3', 3250, 1800)], face);
    expect(sides.get('B2')).not.toEqual({ x: 1, y: -1 });
    expect(sides.get('B3')).toEqual({ x: 1, y: -1 });
    const twins = labelSides([at('C4', 5500, 2000), at('x1', 5520, 2010)], face);
    expect(twins.get('C4')).not.toEqual(twins.get('x1'));
  });
});
