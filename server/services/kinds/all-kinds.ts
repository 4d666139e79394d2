import type { FactKind } from '#domain/vocabulary.ts';
import { anchor } from './anchor.ts';
import { casting } from './casting.ts';
import { cipher } from './cipher.ts';
import { fitment } from './fitment.ts';
import type { KindModule } from './kind-module.ts';
import { maker } from './maker.ts';
import { model } from './model.ts';
import { partType } from './part-type.ts';
import { position } from './position.ts';
import { serialRange } from './serial-range.ts';
import { series } from './series.ts';
import { supersession } from './supersession.ts';
import { wearLimit } from './wear-limit.ts';
import { works } from './works.ts';

/** The list of kinds. */
const ALL_KINDS: { readonly [K in FactKind]: KindModule<K> } = {
  maker,
  works,
  model,
  'part-type': partType,
  position,
  casting,
  fitment,
  supersession,
  series,
  'serial-range': serialRange,
  anchor,
  cipher,
  'wear-limit': wearLimit,
};

/** What the server does about a kind. */
export function kindModule<K extends FactKind>(kind: K): KindModule<K> {
  return ALL_KINDS[kind];
}
