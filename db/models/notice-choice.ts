import type { NoticeKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** Whether a kind of notice also comes by e-mail. Where a member chose nothing there is no row. */
export class NoticeChoice extends RegisterModel {
  static override readonly tableName = 'notice_choices';
  static override readonly idColumn = ['memberId', 'kind'];

  declare memberId: string;
  declare kind: NoticeKind;
  declare byEmail: boolean;
}
