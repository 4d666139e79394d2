import type { Region } from '#contract/parts.ts';
import type { MarkPhoto } from '#db/models/mark-photo.ts';

/** How a mark stands on a photo, as it is sent. */
export type Placing = { readonly region: Region | null; readonly turn: number; readonly mirrored: boolean };

type PlacedColumns = Pick<MarkPhoto, 'regionLeft' | 'regionTop' | 'regionWidth' | 'regionHeight' | 'turn' | 'mirrored'>;

/** The same as the columns have it. */
export function placedColumns({ region, turn, mirrored }: Placing): PlacedColumns {
  return {
    regionLeft: region?.left ?? null,
    regionTop: region?.top ?? null,
    regionWidth: region?.width ?? null,
    regionHeight: region?.height ?? null,
    turn,
    mirrored,
  };
}
