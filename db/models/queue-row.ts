import type { FactKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** Something that waits for a moderator: a contribution put forward, or a flag nobody settled. A view: nothing is written to it. */
export class QueueRow extends RegisterModel {
  static override readonly tableName = 'moderation_queue';

  declare readonly id: string;
  declare readonly type: 'contribution' | 'flag';
  declare readonly kind: FactKind;
  declare readonly makerId: string | null;
  declare readonly title: string;
  /** Who put it forward, or flagged. */
  declare readonly memberId: string;
  declare readonly at: string;
}
