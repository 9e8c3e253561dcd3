/** A ring that turns while work is under way; without motion it stands as a broken ring. With `label` it is announced. */
export function Spinner({ label, className }: { label?: string; className?: string }) {
  const ring = (
    <svg
      viewBox="0 0 16 16"
      width="1em"
      height="1em"
      fill="none"
      stroke="currentColor"
      strokeWidth="2"
      aria-hidden="true"
      className={label ? 'spinner-turn' : `spinner-turn shrink-0 ${className ?? ''}`}
    >
      <circle cx="8" cy="8" r="6" strokeDasharray="26 12" />
    </svg>
  );
  if (!label) return ring;
  return (
    <span
      role="status"
      className={`inline-flex items-center gap-2 font-label text-pencil ${className ?? ''}`}
    >
      {ring}
      {label}
    </span>
  );
}
