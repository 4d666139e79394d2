import { RegisterModel } from './register-model.ts';

/** That a member was shown what others read at a mark, and so no longer reads it independently. */
export class MarkLook extends RegisterModel {
  static override readonly tableName = 'mark_looks';
  static override readonly idColumn = ['markId', 'memberId'];

  declare markId: string;
  declare memberId: string;
  declare at: string;
}
