import { z } from 'zod';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { anchor } from './kinds/anchor.ts';
import { casting } from './kinds/casting.ts';
import { cipher } from './kinds/cipher.ts';
import { fitment } from './kinds/fitment.ts';
import type { KindForm } from './kinds/kind.ts';
import { maker } from './kinds/maker.ts';
import { model } from './kinds/model.ts';
import { partType } from './kinds/part-type.ts';
import { position } from './kinds/position.ts';
import { serialRange } from './kinds/serial-range.ts';
import { series } from './kinds/series.ts';
import { supersession } from './kinds/supersession.ts';
import { wearLimit } from './kinds/wear-limit.ts';
import { works } from './kinds/works.ts';

/** The list of kinds: every form there is, in the order they are offered. */
export const KINDS = {
  cipher,
  casting,
  'serial-range': serialRange,
  anchor,
  fitment,
  supersession,
  series,
  position,
  'part-type': partType,
  model,
  works,
  maker,
  'wear-limit': wearLimit,
} as const satisfies Readonly<Record<FactKind, KindForm>>;

export const Kind = z.enum(FACT_KINDS);
export type Kind = FactKind;

/** What a fact of each kind says. */
export type PayloadOf<K extends FactKind> = z.output<(typeof KINDS)[K]['payload']>;

/** The form of a kind, whichever it is. */
export function formOf(kind: FactKind): KindForm {
  return KINDS[kind];
}
