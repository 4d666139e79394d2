import type { PlateColumns } from './plate-columns.ts';

/** One way to split a mark: which glyphs gave which field. Positions count glyphs from 0, `end` not included. */
export type Division = {
  readonly key: string;
  readonly groups: readonly { readonly field: string; readonly start: number; readonly end: number; readonly value: string }[];
};

/** A line of brackets for each way to split, under the glyphs they hold; the fields are named once where all lines have the same. */
export function PlateBrackets({ divisions, columns }: { readonly divisions: readonly Division[]; readonly columns: PlateColumns }) {
  const names = divisions.map(namesOf);
  const shared = new Set(names).size === 1;
  return (
    <div className="plate-divisions">
      <ul aria-label={divisions.length === 1 ? 'Read as' : 'Ways to read it'}>
        {divisions.map((division) => (
          <li key={division.key} className="plate-division">
            <span className="sr-only">{division.groups.map(({ field, value }) => `${field} ${value}`).join(', ')}</span>
            <Brackets division={division} columns={columns} />
            {!shared && <Names>{namesOf(division)}</Names>}
          </li>
        ))}
      </ul>
      {shared && <Names>{names[0] ?? ''}</Names>}
    </div>
  );
}

function Brackets({ division, columns }: { readonly division: Division; readonly columns: PlateColumns }) {
  return (
    <span aria-hidden="true" className="plate-row" style={{ gridTemplateColumns: columns.template }}>
      {division.groups.map(({ field, start, end, value }) => (
        <span
          key={`${field} ${start}`}
          className="plate-bracket"
          style={{ gridColumn: `${columns.lineBefore(start)} / ${columns.lineAfter(end - 1)}` }}
        >
          <span>{value}</span>
        </span>
      ))}
    </span>
  );
}

function Names({ children }: { readonly children: string }) {
  return (
    <span aria-hidden="true" className="plate-fields">
      {children}
    </span>
  );
}

function namesOf({ groups }: Division): string {
  return groups.map(({ field }) => field).join(' · ');
}
