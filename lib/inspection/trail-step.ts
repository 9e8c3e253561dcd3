import { z } from 'zod';

/** One step by which a number of the plan was found, kept with it: rule, clause, edition, value, where it comes from. */
export const trailStep = z.object({
  rule: z.string(),
  clause: z.string(),
  edition: z.string(),
  value: z.string(),
  provenance: z.enum(['contract', 'seen', 'partly-seen', 'memory', 'computed', 'common-practice']),
  note: z.string().optional(),
});
export type TrailStep = z.infer<typeof trailStep>;
