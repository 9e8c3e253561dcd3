import { z } from 'zod';
import { optionalText } from '@/lib/inspection/primitives';
import { roles } from '@/lib/inspection/roles';

const pourStates = [
  'no-plan',
  'not-read',
  'held',
  'ready',
  'released',
  'placing',
  'placed',
  'placed-without-release',
] as const;

export const pourSorts = ['planned', 'number', 'title', 'state', 'holds', 'read'] as const;

/** What the address of the list of pours says; what it does not know is left out rather than refused. */
const poursQuery = z.object({
  state: z.enum(pourStates).optional().catch(undefined),
  text: optionalText(80).optional().catch(undefined),
  clears: z.enum(roles).optional().catch(undefined),
  sort: z.enum(pourSorts).catch('planned'),
  order: z.enum(['up', 'down']).catch('up'),
  from: z.enum(['today', 'all']).catch('all'),
  after: z.string().max(300).optional().catch(undefined),
});
export type PoursQuery = z.infer<typeof poursQuery>;

/** The address's query as Next hands it over; of a repeated name the first counts. */
export type SearchParams = Record<string, string | string[] | undefined>;

export const firstOf = (params: SearchParams): Record<string, string | undefined> =>
  Object.fromEntries(
    Object.entries(params).map(([name, value]) => [
      name,
      Array.isArray(value) ? value[0] : value || undefined,
    ]),
  );

export const readPoursQuery = (params: SearchParams): PoursQuery => poursQuery.parse(firstOf(params));

/** The address of the list with some of its query changed; a page further on is left whenever the list changes. */
export function poursHref(query: PoursQuery, change: Partial<PoursQuery>, path = '/pours'): string {
  const next: Partial<PoursQuery> = { ...query, after: undefined, ...change };
  const params = new URLSearchParams();
  for (const [name, value] of Object.entries(next)) {
    if (!value) continue;
    if ((name === 'sort' && value === 'planned') || (name === 'order' && value === 'up')) continue;
    if (name === 'from' && value === 'all') continue;
    params.set(name, value);
  }
  const text = params.toString();
  return text ? `${path}?${text}` : path;
}
