/** Which of a person's projects the office shows: kept in a cookie, a preference and never a right. */
export const PROJECT_COOKIE = 'cagewright-project';

/** The project to show: the one chosen before where the person is still in it, else their first. */
export function chosenProject<T extends { id: string }>(
  projects: readonly T[],
  kept: string | undefined,
): T | null {
  return projects.find((project) => project.id === kept) ?? projects[0] ?? null;
}

/** Keeps the choice on this device. */
export function keepProject(projectId: string): void {
  document.cookie = `${PROJECT_COOKIE}=${encodeURIComponent(projectId)}; path=/; max-age=31536000; samesite=lax`;
}
