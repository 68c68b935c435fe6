/** The instrument: a beam, two points, one measured dot. */
export function Mark({ className = 'size-7' }: { className?: string }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 32 32" className={className}>
      <path d="M2 10h28" className="stroke-marking" strokeWidth="2.2" />
      <path d="M4 6h7v7l-3.5 13-3.5-13zM21 6h7v7l-3.5 13-3.5-13z" className="fill-brass" />
      <circle cx="16" cy="19" r="3" className="fill-verdigris" />
    </svg>
  );
}
