import type { FitVerdict } from '#domain/fit/fit.ts';
import type { FitmentVerdict } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** How a part was worked out to fit where it is. */
export class PartFit extends RegisterModel {
  static override readonly tableName = 'part_fits';
  static override readonly idColumn = 'fittingId';
  static override readonly ranges = ['built'];

  declare fittingId: string;
  /** By its dates; these four are `null` together where the part is undated or nobody knows when the machine was built. */
  declare verdict: FitVerdict | null;
  declare late: number | null;
  declare inLead: number | null;
  declare early: number | null;
  /** The mark the dates are from. */
  declare markId: string | null;
  declare built: { readonly from: string; readonly to: string } | null;
  /** By the catalogue's fitments; `null`: not in catalogue. */
  declare typeVerdict: FitmentVerdict | null;
}
