/** The words the register's columns hold. The checks of the schema say the same, and a test compares them. */

/** How a letter fares. Whoever gives it up has tried for long. */
export const MAIL_STATES = ['queued', 'sent', 'failed'] as const;
export type MailState = (typeof MAIL_STATES)[number];

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

/** How far the work on what rests on a changed fact has come. */
export const REWORK_STATES = ['waiting', 'running', 'done', 'failed'] as const;
export type ReworkState = (typeof REWORK_STATES)[number];
