import type { BodyOf } from '@/lib/inspection/entry';
import { lengthText } from './verdict-words';

/** A measured value as it was entered: "142 mm", "12", "38 of 49 tied", "16". */
export function measuredText(value: BodyOf<'measurement'>['value']): string {
  switch (value.quantity) {
    case 'length':
      return lengthText(value.length);
    case 'count':
      return String(value.count);
    case 'share':
      return `${value.tied} of ${value.of} tied`;
    case 'designation':
      return value.designation;
  }
}
