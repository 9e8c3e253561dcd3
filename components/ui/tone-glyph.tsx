import type { Tone } from './tone';

const shapes: Record<Tone, React.ReactNode> = {
  plain: <path d="M8 3.5v9M3.5 8h9" />,
  info: (
    <>
      <rect x="2" y="2" width="12" height="12" />
      <path d="M8 7.2v4M8 4.6v.9" />
    </>
  ),
  watch: (
    <>
      <circle cx="8" cy="8" r="4.6" />
      <path d="M.8 8h14.4" />
    </>
  ),
  hold: <rect x="2.5" y="2.5" width="11" height="11" fill="currentColor" />,
  met: <circle cx="8" cy="8" r="5.2" />,
};

/** The shape that goes with a tone, so that nothing is said by colour alone. Decorative: the words stand beside it. */
export function ToneGlyph({ tone, className }: { tone: Tone; className?: string }) {
  return (
    <svg
      viewBox="0 0 16 16"
      width="1em"
      height="1em"
      className={className}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.8"
      aria-hidden="true"
    >
      {shapes[tone]}
    </svg>
  );
}
