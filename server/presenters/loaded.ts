/**
 * A relation that the service was to load.
 *
 * @throws TypeError where it did not: an answer with a hole in it is worse than none.
 */
export function loaded<Relation>(relation: Relation | null | undefined): Relation {
  if (relation === null || relation === undefined) throw new TypeError('A relation was not loaded');
  return relation;
}
