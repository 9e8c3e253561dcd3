import type { EntryType } from './entry';
import type { Role } from './roles';

/** Who may record what. Types that only the server writes have no role. */
export const recordedBy: Record<EntryType, readonly Role[]> = {
  answer: ['inspector', 'superintendent'],
  reading: ['inspector'],
  measurement: ['inspector'],
  photo: ['inspector', 'superintendent', 'engineer', 'crew', 'coordinator'],
  note: ['inspector', 'superintendent', 'engineer', 'coordinator'],
  query: ['inspector', 'superintendent', 'engineer', 'coordinator'],
  'query-answered': ['inspector', 'superintendent', 'engineer'],
  nonconformance: ['inspector', 'superintendent', 'engineer'],
  correction: ['superintendent', 'crew'],
  recheck: ['inspector'],
  'last-walk': ['inspector'],
  'site-event': ['inspector', 'superintendent', 'engineer'],
  'verbal-instruction': ['inspector', 'superintendent'],
  'condition-verified': ['inspector'],
  amendment: ['inspector', 'superintendent', 'engineer', 'coordinator'],
  hold: ['inspector', 'engineer', 'coordinator'],
  'hold-lifted': ['inspector', 'superintendent', 'engineer', 'coordinator'],
  'inspection-asked': ['superintendent'],
  placement: ['inspector', 'superintendent'],
  signature: ['inspector', 'superintendent'],
  disposition: ['engineer'],
  'release-asked': ['superintendent'],
  'block-check': ['inspector', 'coordinator'],
  'instrument-status': ['inspector', 'coordinator'],
  'drawing-received': ['engineer', 'coordinator'],
  'mix-changed': ['superintendent', 'engineer', 'coordinator'],
  'rules-changed': ['engineer', 'coordinator'],
  'plan-issued': [],
  'photo-stored': [],
  'photo-refused': [],
  'signature-confirmed': [],
  release: [],
  'release-refused': [],
  'release-void': [],
  'placing-without-release': [],
  'member-changed': [],
};

/** May a person of this role record an entry of this type? */
export const mayRecord = (type: EntryType, role: Role): boolean => recordedBy[type].includes(role);
