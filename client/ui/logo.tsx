/** A flask in two halves that did not quite meet. */
export function Logo() {
  return (
    <svg viewBox="0 0 32 32" width="32" height="32" aria-hidden="true" focusable="false" className="shrink-0 stroke-graphite">
      <path d="M3 5h22v10H3z" className="fill-paper" strokeWidth="2.5" />
      <path d="M7 17h22v10H7z" className="fill-oxide" strokeWidth="2.5" />
      <path d="M9 15a7 7 0 0 1 14 0z" className="fill-paper" strokeWidth="2" />
      <path d="M11 17a6.5 6.5 0 0 0 13 0z" className="fill-sand" strokeWidth="2" />
    </svg>
  );
}
