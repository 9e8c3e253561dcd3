import { checklistItems, type TemplateFor } from './checklist-items';
import type { CheckItem } from './plan';

export interface ChecklistTemplate {
  template: string;
  version: number;
  items: CheckItem[];
}

/** The templates that ship, by what is being built. */
export const templateWords: Record<TemplateFor, string> = {
  'slab-on-ground': 'Slab on ground',
  slab: 'Suspended slab',
  wall: 'Wall',
  column: 'Column',
  beam: 'Beam',
  footing: 'Footing',
  mat: 'Mat foundation',
  pier: 'Pier or shaft cage',
  stair: 'Stair',
  deck: 'Bridge or quay deck',
  'post-tensioned-slab': 'Post-tensioned slab',
};

/** Raised with any change of wording or content of an item: a pour keeps the version it was planned with. */
export const CHECKLIST_VERSION = 1;

/** The checklist of one kind of element. What is asked is common practice; the contract documents may ask for more. */
export function checklistTemplate(kind: TemplateFor): ChecklistTemplate {
  return {
    template: templateWords[kind],
    version: CHECKLIST_VERSION,
    items: checklistItems
      .filter((item) => item.for === 'all' || item.for.includes(kind))
      .map(({ for: _for, ...item }) => ({
        evidence: 'none',
        critical: false,
        notApplicable: true,
        attendance: 'none',
        closedBy: 'inspector',
        elementId: null,
        ...item,
      })),
  };
}
