import { RegisterModel } from './register-model.ts';

/** One of the makers a moderator decides for. */
export class MemberScope extends RegisterModel {
  static override readonly tableName = 'member_scopes';
  static override readonly idColumn = ['memberId', 'makerId'];

  declare memberId: string;
  declare makerId: string;
}
