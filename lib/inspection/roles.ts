import { z } from 'zod';

/** One role per project membership (design: the people). */
export const roles = ['inspector', 'superintendent', 'engineer', 'crew', 'coordinator', 'viewer'] as const;
export const role = z.enum(roles);
export type Role = z.infer<typeof role>;

/** What people call each role on screens, in mail and on documents. */
export const roleWords: Record<Role, string> = {
  inspector: 'Inspector',
  superintendent: 'Superintendent',
  engineer: 'Engineer of record',
  crew: 'Crew',
  coordinator: 'Coordinator',
  viewer: 'Viewer',
};
