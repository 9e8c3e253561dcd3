import { roleWords } from '@/lib/inspection/roles';
import { demoPeople } from '@/db/seeds/demo-people';

/** Prints the demo people with their sign-ins, a line each. */
for (const person of demoPeople) {
  console.log(`${roleWords[person.role].padEnd(20)}${person.email.padEnd(36)}${person.password}`);
}
