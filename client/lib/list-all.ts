/** Pages followed before giving up: two thousand entries at a hundred a page. */
const PAGES = 20;

type Page<Item> = { readonly items: readonly Item[]; readonly next: string | null };

/** Follows a list's cursors to its end, for lists a reader chooses from whole (makers, models). */
export async function listAll<Item>(load: (after: string | undefined) => Promise<Page<Item>>): Promise<readonly Item[]> {
  const items: Item[] = [];
  let after: string | undefined;
  for (let page = 0; page < PAGES; page += 1) {
    const { items: more, next } = await load(after);
    items.push(...more);
    if (next === null) break;
    after = next;
  }
  return items;
}
