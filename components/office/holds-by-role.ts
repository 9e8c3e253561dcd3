import { roleWords, roles, type Role } from '@/lib/inspection/roles';
import type { Hold } from '@/lib/inspection/sheet-types';

/**
 * Holds grouped by who clears them, in the order of the roles; roles without holds are left out.
 * @param own the reader's role, whose holds come first
 */
export function holdsByRole(holds: readonly Hold[], own?: Role): { role: Role; holds: Hold[] }[] {
  return [...roles]
    .sort((a, b) => Number(b === own) - Number(a === own))
    .map((role) => ({ role, holds: holds.filter((hold) => hold.clearedBy === role) }))
    .filter((group) => group.holds.length > 0);
}

/** "4 holds · inspector 3, engineer of record 1". */
export function holdCountWords(counts: Partial<Record<Role, number>>): string {
  const named = roles.flatMap((role) => {
    const count = counts[role] ?? 0;
    return count > 0 ? [`${roleWords[role].toLowerCase()} ${count}`] : [];
  });
  const total = roles.reduce((sum, role) => sum + (counts[role] ?? 0), 0);
  if (total === 0) return 'no holds';
  return `${total} ${total === 1 ? 'hold' : 'holds'} · ${named.join(', ')}`;
}
