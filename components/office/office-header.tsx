import Link from 'next/link';
import { PersonMenu } from './person-menu';
import { NavLink } from './nav-link';
import { ProjectSwitch } from './project-switch';

export interface OfficeLink {
  href: string;
  label: string;
}

/** The head of every office page: the program's name, the project, where one can go, and who is signed in. */
export function OfficeHeader({
  projects,
  currentProjectId,
  links,
  person,
}: {
  projects: { id: string; name: string }[];
  currentProjectId: string | null;
  links: OfficeLink[];
  person: { id: string; name: string; email: string; roleWords: string };
}) {
  const current = projects.find((project) => project.id === currentProjectId);
  return (
    <header className="border-b-[1.5px] border-ink bg-sheet print:hidden">
      <div className="mx-auto flex max-w-7xl flex-wrap items-center gap-x-5 gap-y-1 px-4 py-1.5">
        <Link
          href="/"
          prefetch={false}
          className="inline-flex min-h-target items-center font-label text-lead font-semibold"
        >
          Cagewright
        </Link>
        {projects.length > 1 && current ? (
          <div className="order-2 w-full md:order-none md:w-auto">
            <ProjectSwitch projects={projects} currentId={current.id} />
          </div>
        ) : (
          current && (
            <p className="order-2 w-full font-label text-body font-medium text-pencil md:order-none md:w-auto">
              {current.name}
            </p>
          )
        )}
        <nav aria-label="Main" className="order-last -mx-1 w-[calc(100%+0.5rem)] md:order-none md:w-auto">
          <ul className="flex flex-wrap justify-between md:gap-1">
            {links.map((link) => (
              <li key={link.href}>
                <NavLink {...link} />
              </li>
            ))}
          </ul>
        </nav>
        <div className="ml-auto md:order-last">
          <PersonMenu person={person} />
        </div>
      </div>
    </header>
  );
}
