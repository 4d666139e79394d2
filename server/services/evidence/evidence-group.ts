import type { EvidenceGroup, EvidenceItem } from '#contract/evidence.ts';

/** Lines listed in a group; the count tells them all. */
const MOST_LISTED = 25;

/** A group of evidence while it is gathered. */
export type Gathering = {
  /** One more, told by `item` if it may be shown; what stands on a part that is not public is only counted. */
  readonly add: (isPublic: boolean, item: () => EvidenceItem) => void;
  /** `of`: out of how many; left out where there is no whole. */
  readonly done: (of?: number) => EvidenceGroup;
};

export function gathering(code: string, title: string): Gathering {
  let count = 0;
  let unlisted = 0;
  const items: EvidenceItem[] = [];
  return {
    add: (isPublic, item) => {
      count += 1;
      if (!isPublic) unlisted += 1;
      else if (items.length < MOST_LISTED) items.push(item());
    },
    done: (of) => ({ code, title, count, of: of ?? null, items, unlisted }),
  };
}

/** A group whose lines are all there and may all be shown. */
export function groupOf(code: string, title: string, items: readonly EvidenceItem[], of?: number): EvidenceGroup {
  return { code, title, count: items.length, of: of ?? null, items: items.slice(0, MOST_LISTED), unlisted: 0 };
}

/** A group that says only how many. */
export function countOf(code: string, title: string, count: number): EvidenceGroup {
  return { code, title, count, of: null, items: [], unlisted: 0 };
}
