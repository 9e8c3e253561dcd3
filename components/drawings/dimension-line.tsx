/** A dimension: a line between two ticks with its length over it; decoration, the text alternative says it too. */
export function DimensionLine({ text, upright = false }: { text: string; upright?: boolean }) {
  if (upright) {
    return (
      <div className="relative w-5" aria-hidden="true">
        <svg width="100%" height="100%" className="absolute inset-0" stroke="var(--pencil)">
          <line x1="6" x2="6" y1="0" y2="100%" />
          <path d="M2 .5h8" />
          <svg y="100%" overflow="visible">
            <path d="M2-.5h8" />
          </svg>
        </svg>
        <span className="absolute inset-0 grid place-items-center">
          <span className="[writing-mode:vertical-rl] rotate-180 bg-sheet py-1.5 font-figure text-xs font-medium whitespace-nowrap text-pencil">
            {text}
          </span>
        </span>
      </div>
    );
  }
  return (
    <div className="relative h-5" aria-hidden="true">
      <svg width="100%" height="100%" className="absolute inset-0" stroke="var(--pencil)">
        <line x1="0" x2="100%" y1="10" y2="10" />
        <path d="M.5 6v8" />
        <svg x="100%" overflow="visible">
          <path d="M-.5 6v8" />
        </svg>
      </svg>
      <span className="absolute inset-0 grid place-items-center">
        <span className="bg-sheet px-1.5 font-figure text-xs font-medium whitespace-nowrap text-pencil">
          {text}
        </span>
      </span>
    </div>
  );
}
