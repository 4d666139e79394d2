/** The words the register's columns hold. The checks of the schema say the same, and a test compares them. */

/** The kinds of fact; each has a table of its own. */
export const FACT_KINDS = [
  'maker',
  'works',
  'model',
  'part-type',
  'position',
  'casting',
  'fitment',
  'supersession',
  'series',
  'serial-range',
  'anchor',
  'cipher',
] as const;
export type FactKind = (typeof FACT_KINDS)[number];

export const SOURCE_KINDS = ['book', 'drawing', 'plate', 'photo', 'sighting', 'correspondence', 'own-knowledge'] as const;
export type SourceKind = (typeof SOURCE_KINDS)[number];

export const MACHINE_KINDS = ['crawler-tractor', 'lathe', 'stationary-engine', 'barn-machine'] as const;
export type MachineKind = (typeof MACHINE_KINDS)[number];

/** `as-built`: left the works so. The two that fit bolt on and work, but were never there on that serial. */
export const FITMENT_VERDICTS = ['as-built', 'later-fits', 'earlier-fits', 'does-not-belong'] as const;
export type FitmentVerdict = (typeof FITMENT_VERDICTS)[number];

/** Whether the old casting also goes where the new one was fitted. */
export const INTERCHANGES = ['both-ways', 'new-for-old'] as const;
export type Interchange = (typeof INTERCHANGES)[number];

/** What a date by a serial number is the date of: four different things, never mixed. */
export const DATE_MEANINGS = ['built', 'dispatched', 'sold', 'model-year'] as const;
export type DateMeaning = (typeof DATE_MEANINGS)[number];

/** How finely the source tells a span's ends. */
export const DATE_PRECISIONS = ['day', 'month', 'year'] as const;
export type DatePrecision = (typeof DATE_PRECISIONS)[number];

/** What a member can be told of, and choose to get by e-mail too. */
export const NOTICE_KINDS = ['account', 'role', 'contribution', 'recomputed', 'reading', 'handover', 'message'] as const;
export type NoticeKind = (typeof NOTICE_KINDS)[number];

/** How a letter fares. Whoever gives it up has tried for long. */
export const MAIL_STATES = ['queued', 'sent', 'failed'] as const;
export type MailState = (typeof MAIL_STATES)[number];

export const MEMBER_ROLES = ['member', 'moderator', 'registrar'] as const;
export type MemberRole = (typeof MEMBER_ROLES)[number];

/** Which makers a moderator decides for; of everybody else `none`. */
export const MEMBER_SCOPES = ['none', 'some', 'all'] as const;
export type MemberScopeKind = (typeof MEMBER_SCOPES)[number];

/** `owed`: the password was right and the second factor is still to come. */
export const SESSION_STAGES = ['owed', 'open'] as const;
export type SessionStage = (typeof SESSION_STAGES)[number];

/** What a member proved who they are with. */
export const SIGN_IN_STRENGTHS = ['password', 'second-factor'] as const;
export type SignInStrength = (typeof SIGN_IN_STRENGTHS)[number];

/** What a link sent by e-mail is for. */
export const LINK_PURPOSES = ['verify', 'reset', 'change-email'] as const;
export type LinkPurpose = (typeof LINK_PURPOSES)[number];

/** What is counted and slowed down: guesses of a secret, and letters sent on somebody's word. */
export const ATTEMPT_KINDS = ['password', 'second-factor', 'letter'] as const;
export type AttemptKind = (typeof ATTEMPT_KINDS)[number];

/** What a former member is called. */
export const FORMER_MEMBER = 'a former member';
