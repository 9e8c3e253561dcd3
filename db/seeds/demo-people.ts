import type { Role } from '@/lib/inspection/roles';

export interface DemoPerson {
  id: string;
  name: string;
  email: string;
  role: Role;
  password: string;
  licence: string;
  certification: string;
}

const password = 'tide-table-lantern';
const person = (
  number: number,
  name: string,
  email: string,
  role: Role,
  more: Partial<DemoPerson> = {},
): DemoPerson => ({
  id: `0193a000-0000-7000-8000-00000000000${number}`,
  name,
  email: `${email}@example.test`,
  role,
  password,
  licence: '',
  certification: '',
  ...more,
});

/** The invented people of the demo, one for each role and a second inspector. Nobody of these names is meant. */
export const demoPeople = [
  person(1, 'Noor Valdés', 'noor', 'inspector', { certification: 'RI-2217' }),
  person(2, 'Tomasz Brük', 'tomasz', 'inspector', { certification: 'RI-2280' }),
  person(3, 'Marit Ødegård', 'marit', 'superintendent'),
  person(4, 'Ines Calloway-Ruß', 'ines', 'engineer', { licence: 'SE 40 117' }),
  person(5, 'Elías Montaño', 'elias', 'crew'),
  person(6, 'Priya Halloran', 'priya', 'coordinator'),
  person(7, 'Owen Šimek', 'owen', 'viewer'),
] as const satisfies readonly DemoPerson[];

/** The first person of a role. */
export function demoPerson(role: Role): DemoPerson {
  const found = demoPeople.find((one) => one.role === role);
  if (!found) throw new Error(`The demo has nobody in the role ${role}.`);
  return found;
}
