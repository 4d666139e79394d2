import type { ReactNode } from 'react';

const SIGNS: readonly { readonly sign: string; readonly means: ReactNode }[] = [
  { sign: '?', means: 'one glyph that can’t be read' },
  { sign: '[OD]', means: 'one of these' },
  { sign: '*', means: 'any number broken away, none included' },
];

/** The mark notation as far as a casting number needs it. */
export function NotationHelp() {
  return (
    <dl className="grid grid-cols-[max-content_1fr] items-baseline gap-x-3 gap-y-2">
      {SIGNS.map(({ sign, means }) => (
        <div key={sign} className="contents">
          <dt>
            <code className="bg-bed px-1.5 py-0.5 font-mono text-graphite">{sign}</code>
          </dt>
          <dd>{means}</dd>
        </div>
      ))}
    </dl>
  );
}
