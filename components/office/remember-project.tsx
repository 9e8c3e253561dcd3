'use client';

import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { keepProject, PROJECT_COOKIE } from './project-choice';

/** A page that was reached by its address may be of another project than the one shown last: the head follows it. */
export function RememberProject({ projectId }: { projectId: string }) {
  const router = useRouter();
  useEffect(() => {
    const kept = document.cookie
      .split('; ')
      .find((pair) => pair.startsWith(`${PROJECT_COOKIE}=`))
      ?.slice(PROJECT_COOKIE.length + 1);
    if (kept === projectId) return;
    keepProject(projectId);
    router.refresh();
  }, [projectId, router]);
  return null;
}
