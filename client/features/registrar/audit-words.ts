import type { AuditAct, AuditRow } from '#contract/admin.ts';

/** Every act that is written down, as it is said of who did it. */
export const ACT_WORDS: Readonly<Record<AuditAct, string>> = {
  'account.opened': 'opened an account',
  'account.refused': 'asked for an account at an address that has one',
  'account.verified': 'confirmed an address',
  'account.closed': 'closed the account',
  'account.renamed': 'changed the name',
  'account.exported': 'took a copy of the data on record',
  'session.started': 'signed in',
  'session.refused': 'was refused at sign-in',
  'session.ended': 'ended sessions',
  'password.changed': 'changed the password',
  'password.reset-asked': 'asked for a new password',
  'password.reset': 'set a new password by a link',
  'email.change-asked': 'asked for another address',
  'email.changed': 'changed the address',
  'second-factor.added': 'added a second factor',
  'second-factor.removed': 'removed a second factor',
  'recovery-codes.renewed': 'made new recovery codes',
  'recovery-code.used': 'used a recovery code',
  'role.changed': 'changed a role',
  'member.suspended': 'suspended a member',
  'member.unsuspended': 'lifted a suspension',
  'notices.chosen': 'chose which notices come by e-mail',
  'contribution.started': 'began a contribution',
  'contribution.discarded': 'threw a draft away',
  'contribution.put-forward': 'put a contribution forward',
  'contribution.withdrawn': 'took back a contribution',
  'contribution.commented': 'commented on a contribution',
  'contribution.entered': 'entered a contribution',
  'contribution.sent-back': 'sent a contribution back',
  'contribution.turned-down': 'turned a contribution down',
  'fact.brought-back': 'brought an older version back',
  'fact.retired': 'retired a fact',
  'fact.flagged': 'flagged a fact',
  'flag.settled': 'settled a flag',
  'series.reading-marked': 'marked an account as the register’s reading',
  'photo.added': 'added a photo',
  'photo.removed': 'removed a photo',
  'part.recorded': 'put a part on record',
  'part.changed': 'changed a part',
  'part.removed': 'took a part off the record',
  'mark.recorded': 'put a mark on record',
  'mark.changed': 'changed a mark',
  'mark.placed': 'said where a mark stands on a photo',
  'mark.removed': 'took a mark off the record',
  'reading.made': 'read a mark',
  'reading.taken-back': 'took a reading back',
};

/** What was written down beside an act, part by part: `reason: wrong password`. */
export function sayDetail(detail: AuditRow['detail']): readonly string[] {
  return Object.entries(detail).map(([name, value]) => `${plain(name)}: ${sayValue(value)}`);
}

function sayValue(value: AuditRow['detail'][string]): string {
  if (value === null) return 'none';
  if (Array.isArray(value)) return value.length === 0 ? 'none' : value.map(sayValue).join(', ');
  return typeof value === 'object' ? JSON.stringify(value) : String(value);
}

/** `otherSessionsEnded` → `other sessions ended`. */
function plain(name: string): string {
  return name.replace(/([A-Z])/g, (letter) => ` ${letter.toLowerCase()}`);
}
