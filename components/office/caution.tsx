/** What the program never takes over from people; said where it matters. */
export function Caution({ children }: { children?: React.ReactNode }) {
  return (
    <p className="max-w-4xl border-l-[6px] border-watch pl-3 text-label">
      {children}
      {children ? ' ' : ''}The contract documents and the local code govern. Figures here are decision support
      for a licensed engineer; nothing here replaces the required inspection by qualified people.
    </p>
  );
}
