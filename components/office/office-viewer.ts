import type { Role } from '@/lib/inspection/roles';

/** Who looks at a page, in which project, and when: what every office component may need to know. */
export interface OfficeViewer {
  personId: string;
  role: Role;
  timeZone: string;
  /** The server's time when the page was drawn. */
  now: string;
  people: ReadonlyMap<string, string>;
}
