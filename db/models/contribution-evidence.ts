import { RegisterModel } from './register-model.ts';

/** What the record said about a contribution at one time. */
export class ContributionEvidence extends RegisterModel {
  static override readonly tableName = 'contribution_evidence';
  static override readonly jsonAttributes = ['findings'];

  declare id: string;
  declare contributionId: string;
  declare revision: number;
  /** When its author put it forward, or when a moderator opened it. */
  declare occasion: 'put-forward' | 'opened';
  declare gatheredAt: string;
  /** Groups and figures, as the interface tells them. */
  declare findings: Readonly<Record<string, unknown>>;
}
