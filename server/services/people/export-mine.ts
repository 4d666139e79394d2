import type { Knex } from 'knex';
import { AuditRow } from '#db/models/audit-row.ts';
import { ContributionComment } from '#db/models/contribution-comment.ts';
import { Contribution } from '#db/models/contribution.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import { Flag } from '#db/models/flag.ts';
import { MailMessage } from '#db/models/mail-message.ts';
import type { Maker } from '#db/models/maker.ts';
import { Mark } from '#db/models/mark.ts';
import { Member } from '#db/models/member.ts';
import { NoticeChoice } from '#db/models/notice-choice.ts';
import { Notice } from '#db/models/notice.ts';
import { Part } from '#db/models/part.ts';
import { Passkey } from '#db/models/passkey.ts';
import { Photo } from '#db/models/photo.ts';
import { Reading } from '#db/models/reading.ts';
import type { Session } from '#db/models/session.ts';
import { Source } from '#db/models/source.ts';
import { requireRecentProof } from '#server/policies/identity.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { readSecondFactors } from '#server/services/second-factors/read-second-factors.ts';
import type { SecondFactors } from '#server/services/second-factors/read-second-factors.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { makersOf } from './read-me.ts';
import type { RequestContext } from './request-context.ts';
import { listOpenSessions } from './sessions.ts';

export type MineOnRecord = {
  readonly member: Member;
  readonly makers: readonly Maker[];
  readonly sessions: readonly Session[];
  readonly secondFactors: SecondFactors;
  readonly passkeys: readonly Passkey[];
  readonly notices: readonly Notice[];
  readonly noticeChoices: readonly NoticeChoice[];
  readonly letters: readonly MailMessage[];
  readonly entered: { readonly facts: readonly FactVersion[]; readonly ciphers: readonly CipherVersion[]; readonly sources: readonly Source[] };
  readonly contributions: readonly Contribution[];
  readonly comments: readonly ContributionComment[];
  readonly flags: readonly Flag[];
  /** With their photos; what others read of their marks is the others'. */
  readonly parts: readonly Part[];
  /** Of those parts, with their photos. */
  readonly marks: readonly Mark[];
  readonly readings: readonly Reading[];
  /** With what their bytes are. */
  readonly photos: readonly Photo[];
  /** What they did and what was done to them. */
  readonly acts: readonly AuditRow[];
};

/**
 * Everything on record about a member, of nobody else, and no secret.
 *
 * @throws ProblemError `identity-not-confirmed` when they have not proved who they are within ten minutes.
 */
export async function exportMine(viewer: MemberViewer, { requestId }: RequestContext, knex: Knex): Promise<MineOnRecord> {
  requireRecentProof(viewer);
  const { id: memberId } = viewer;
  return withTransaction(
    knex,
    async (trx) => {
      await writeAudit({ act: 'account.exported', actorId: memberId, subject: { kind: 'member', id: memberId }, requestId }, trx);
      return {
        member: await Member.query(trx).findById(memberId).throwIfNotFound(),
        makers: await makersOf(memberId, trx),
        sessions: await listOpenSessions(memberId, trx),
        secondFactors: await readSecondFactors(memberId, trx),
        passkeys: await Passkey.query(trx).where({ memberId }).orderBy('addedAt'),
        notices: await Notice.query(trx).where({ memberId }).orderBy(['at', 'id']),
        noticeChoices: await NoticeChoice.query(trx).where({ memberId }).orderBy('kind'),
        letters: await MailMessage.query(trx).where({ memberId }).orderBy(['queuedAt', 'id']),
        entered: {
          facts: await FactVersion.query(trx).where({ enteredById: memberId }).orderBy(['enteredAt', 'factId', 'number']),
          ciphers: await CipherVersion.query(trx).where({ enteredById: memberId }).orderBy(['enteredAt', 'cipherId', 'number']),
          sources: await Source.query(trx).where({ enteredById: memberId }).orWhere({ memberId }).orderBy(['enteredAt', 'id']),
        },
        contributions: await Contribution.query(trx).where({ authorId: memberId }).orderBy(['startedAt', 'id']),
        comments: await ContributionComment.query(trx).where({ authorId: memberId }).orderBy(['at', 'id']),
        flags: await Flag.query(trx).where({ byId: memberId }).orderBy(['at', 'id']),
        parts: await Part.query(trx).where({ holderId: memberId }).orderBy(['recordedAt', 'id']).withGraphFetched('[partType, maker, foundModel, photos]'),
        marks: await Mark.query(trx).whereIn('partId', Part.query(trx).where({ holderId: memberId }).select('id')).orderBy('id').withGraphFetched('photos'),
        readings: await Reading.query(trx).where({ readerId: memberId }).orderBy(['madeAt', 'id']),
        photos: await Photo.query(trx).where({ ownerId: memberId }).orderBy(['addedAt', 'id']).withGraphFetched('picture'),
        acts: await AuditRow.query(trx).where({ actorId: memberId }).orWhere({ subjectKind: 'member', subjectId: memberId }).orderBy(['at', 'id']),
      };
    },
    { actorId: memberId },
  );
}
