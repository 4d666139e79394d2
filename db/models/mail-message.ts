import type { MailState } from '#db/vocabulary.ts';
import type { NoticeKind } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** A letter and how it fared. Who it went to is forgotten with the member; what it said, as soon as it is settled. */
export class MailMessage extends RegisterModel {
  static override readonly tableName = 'mail_messages';
  static override readonly jsonAttributes = ['data'];

  declare id: string;
  /** Whose address it is; null where it is nobody's account. */
  declare memberId: string | null;
  declare toAddress: string | null;
  declare template: string;
  /** What the template is filled in with; null once settled. */
  declare data: Readonly<Record<string, unknown>> | null;
  /** The kind of notice it brings; null for a letter of its own. */
  declare noticeKind: NoticeKind | null;
  declare unsubscribeHash: Buffer | null;
  declare state: MailState;
  declare attempts: number;
  declare lastError: string | null;
  declare queuedAt: string;
  declare lastAttemptAt: string | null;
  declare leasedUntil: string | null;
  /** When it was sent or given up. */
  declare settledAt: string | null;
}
