import type { ReactNode } from 'react';

/** The main part of an office page. */
export function PageMain({ children, narrow = false }: { children: ReactNode; narrow?: boolean }) {
  return (
    <main
      id="main"
      className={`mx-auto grid gap-6 px-4 py-6 *:min-w-0 ${narrow ? 'max-w-3xl' : 'max-w-7xl'}`}
    >
      {children}
    </main>
  );
}
