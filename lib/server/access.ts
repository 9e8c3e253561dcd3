import type { Role } from '@/lib/inspection/roles';

const everybody: readonly Role[] = [
  'inspector',
  'superintendent',
  'engineer',
  'crew',
  'coordinator',
  'viewer',
];
/** Crew work from the fix list of their own pours; everything else of the office is not theirs to see. */
const office: readonly Role[] = ['inspector', 'superintendent', 'engineer', 'coordinator', 'viewer'];
const recorders: readonly Role[] = ['inspector', 'superintendent', 'engineer', 'crew', 'coordinator'];
const planners: readonly Role[] = ['inspector', 'superintendent', 'engineer'];
const signers: readonly Role[] = ['inspector', 'superintendent'];

/**
 * Action x role: the single source for route handlers, pages and what screens offer. `public` needs no session,
 * `session` a signed-in person of any project or none. Which type of entry a role records is told by
 * lib/inspection/entry-access; an action here only opens the door to it.
 */
export const access = {
  'health.read': 'public',
  'auth.sign-in': 'public',
  'release.verify': 'public',

  'device.index': 'session',
  'account.read': 'session',
  'account.sign-out-everywhere': 'session',

  'record.push': recorders,
  'record.pull': everybody,
  'photo.send': recorders,
  'photo.see': everybody,

  'pours.list': office,
  'pour.read': office,
  'pour.create': planners,
  'plan.revise': planners,
  'entry.record': ['inspector', 'superintendent', 'engineer', 'coordinator'],
  'signature.confirm': signers,
  'disposition.sign': ['engineer'],
  'release.give': ['superintendent', 'engineer'],
  'release.void': ['inspector', 'superintendent', 'engineer'],
  'nonconformances.list': office,
  'project.read': office,
} as const satisfies Record<string, readonly Role[] | 'public' | 'session'>;

export type Action = keyof typeof access;

/** May a person of this role do this? Public actions and those of any session are open to every role. */
export function allowed(action: Action, role: Role): boolean {
  const who: readonly Role[] | 'public' | 'session' = access[action];
  return typeof who === 'string' || who.includes(role);
}

/** What a screen may offer to this role. */
export function actionsOf(role: Role): Action[] {
  return (Object.keys(access) as Action[]).filter((action) => allowed(action, role));
}
