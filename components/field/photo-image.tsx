/** A photo as it lies on the device or behind its short-lived address: it is served as it is, at one size. */
export function PhotoImage({ src, alt, className }: { src: string; alt: string; className?: string }) {
  return (
    <picture>
      <img src={src} alt={alt} className={className} />
    </picture>
  );
}
