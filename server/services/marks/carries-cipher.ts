import type { Knex } from 'knex';

/** Who made and who poured a part, as far as that is known. */
export type Origin = {
  readonly makerId: string | null;
  /** `null` while its casting is not known; then any foundry may have poured it. Otherwise its maker, unless the catalogue names another. */
  readonly foundryId: string | null;
};

type Bearing = { readonly makerId: string; readonly foundryId: string | null };

/**
 * Whether a part of that origin may carry the cipher: it is its maker's, and where it is known to depend on the foundry, that foundry's.
 * A part of which only a foundry is known may carry what that foundry put on anybody's castings.
 */
export function carriesCipher(part: Origin, cipher: Bearing): boolean {
  if (part.makerId === null) return false;
  if (part.makerId === cipher.makerId) return cipher.foundryId === null || part.foundryId === null || part.foundryId === cipher.foundryId;
  return part.foundryId === null && part.makerId === cipher.foundryId;
}

/** The same of the rows of `part_origins`, in a query that has joined them. */
export function whereCarriesCipher(query: Knex.QueryBuilder, { makerId, foundryId }: Bearing): void {
  void query.where((either) => {
    void either.where((own) => {
      void own.where('part_origins.makerId', makerId);
      if (foundryId !== null) void own.where((foundry) => void foundry.whereNull('part_origins.foundryId').orWhere('part_origins.foundryId', foundryId));
    });
    if (foundryId !== null && foundryId !== makerId) {
      void either.orWhere((other) => void other.where('part_origins.makerId', foundryId).whereNull('part_origins.foundryId'));
    }
  });
}
