const ICONS = {
  check: 'M3 8.5 6.5 12 13 4.5',
  around: 'M8 2.5a5.5 5.5 0 0 1 3.9 1.6M13.5 8a5.5 5.5 0 0 1-1.6 3.9M8 13.5a5.5 5.5 0 0 1-3.9-1.6M2.5 8a5.5 5.5 0 0 1 1.6-3.9',
  before: 'M2.5 3v10M14 8H6M9 4.5 5.5 8 9 11.5',
  after: 'M2.5 3v10M2.5 8H13M9.5 4.5 13 8l-3.5 3.5',
  question: 'M4 5.6a4 4 0 1 1 5.8 3.2C8.6 9.5 8 10 8 11M8 13.4v1.6',
  cross: 'M3.5 3.5l9 9M12.5 3.5l-9 9',
  warning: 'M8 2 14.5 13.5h-13zM8 6.5v3.5M8 11.6v.4',
  dash: 'M3 8h10',
} as const;
export type IconName = keyof typeof ICONS;

/** A small line drawing beside a word; never instead of one. */
export function Icon({ name }: { readonly name: IconName }) {
  return (
    <svg viewBox="0 0 16 16" width="0.95em" height="0.95em" aria-hidden="true" focusable="false" className="inline-block shrink-0">
      <path d={ICONS[name]} fill="none" stroke="currentColor" strokeWidth="2" />
    </svg>
  );
}
