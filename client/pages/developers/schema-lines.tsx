import type { OutlineLine } from './schema-outline.ts';

const INDENTS = ['pl-0', 'pl-4', 'pl-8', 'pl-12', 'pl-16', 'pl-20'] as const;

/** The fragment a named shape stands at. */
export function shapeId(name: string): string {
  return `shape-${name}`;
}

/** A shape, line by line. */
export function SchemaLines({ lines, label }: { readonly lines: readonly OutlineLine[]; readonly label: string }) {
  return (
    <ul aria-label={label} className="border-t border-rule text-[15px] leading-snug">
      {lines.map(({ depth, name, isOptional, type, shape, note }, place) => (
        <li key={place} className={`border-b border-rule py-1.5 ${INDENTS[Math.min(depth, INDENTS.length - 1)] ?? ''}`}>
          {name !== '' && (
            <>
              <span className="font-mono font-bold">{name}</span>
              {isOptional && <span className="text-slag italic"> (may be left out)</span>}{' '}
            </>
          )}
          <span className="font-mono break-words">{shape === null ? type : <a href={`#${shapeId(shape)}`}>{type}</a>}</span>
          {note !== '' && <span className="text-slag">; {note}</span>}
        </li>
      ))}
    </ul>
  );
}
