'use client';

import { useRouter } from 'next/navigation';
import { keepProject } from './project-choice';

/** Chooses which of one's projects the office shows. */
export function ProjectSwitch({
  projects,
  currentId,
}: {
  projects: { id: string; name: string }[];
  currentId: string;
}) {
  const router = useRouter();
  return (
    <label className="flex items-center gap-2 font-label text-label font-medium">
      <span className="sr-only sm:not-sr-only sm:text-pencil">Project</span>
      <select
        value={currentId}
        onChange={(event) => {
          keepProject(event.target.value);
          router.push('/pours');
          router.refresh();
        }}
        className="min-h-target max-w-56 border border-pencil bg-sheet px-2 text-body font-semibold text-ink"
      >
        {projects.map((project) => (
          <option key={project.id} value={project.id}>
            {project.name}
          </option>
        ))}
      </select>
    </label>
  );
}
