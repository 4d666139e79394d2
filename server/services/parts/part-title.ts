import type { Knex } from 'knex';
import type { Part } from '#db/models/part.ts';

/** What a part is called that nobody has said anything of. */
const NOT_NAMED = 'Part not named yet';

/** What a part is, in a few words: its type, else what its holder calls it. */
export function partTitle({ partType, called }: Pick<Part, 'partType' | 'called'>): string {
  return partType?.name ?? called ?? NOT_NAMED;
}

/** The same in SQL, as `part_titles.title`, in a query of parts. */
export function joinPartTitles(query: Knex.QueryBuilder, knex: Knex): void {
  const titles = knex('parts')
    .leftJoin('part_types', 'part_types.id', 'parts.partTypeId')
    .select({ partId: 'parts.id' }, knex.raw('coalesce(??, ??, ?) as title', ['part_types.name', 'parts.called', NOT_NAMED]))
    .as('part_titles');
  void query.join(titles, 'part_titles.partId', 'parts.id');
}
