import type { NoticeKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

export class Notice extends RegisterModel {
  static override readonly tableName = 'notices';

  declare id: string;
  declare memberId: string;
  declare kind: NoticeKind;
  declare title: string;
  declare body: string;
  /** An address of this site, from its first slash on. */
  declare href: string | null;
  declare at: string;
  declare readAt: string | null;
}
