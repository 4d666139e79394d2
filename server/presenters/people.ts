import { z } from 'zod';
import type { SessionItem as SessionAnswer, SignInAnswer } from '#contract/accounts.ts';
import type { Me } from '#contract/people.ts';
import type { Session } from '#db/models/session.ts';
import { mayDecide, maySeeAudit, maySeeMembers } from '#server/policies/staff.ts';
import type { MineOnRecord } from '#server/services/people/export-mine.ts';
import type { MeOnRecord } from '#server/services/people/read-me.ts';
import type { SignedIn } from '#server/services/people/sign-in.ts';
import { hasSecondFactor } from '#server/services/second-factors/read-second-factors.ts';
import { presentNamed } from './common.ts';
import { loaded } from './loaded.ts';

type SessionItem = z.infer<typeof SessionAnswer>;
type SignInState = z.infer<typeof SignInAnswer>;
type Json = z.core.util.JSONType;

export function presentMe({ member, makers, standing, secondFactors, unreadNotices }: MeOnRecord): Me {
  return {
    id: member.id,
    displayName: member.displayName,
    email: loaded(member.email),
    role: member.role,
    moderates: member.scope === 'all' ? null : makers.map(presentNamed),
    secondFactors: { ...secondFactors },
    secondFactorOwed: standing.secondFactorOwed,
    unreadNotices,
    can: { decideContributions: mayDecide(standing), seeMembers: maySeeMembers(standing), seeAudit: maySeeAudit(standing) },
  };
}

export function presentSignIn(signedIn: SignedIn): SignInState {
  if (signedIn.state === 'signed-in') return { state: 'signed-in', me: presentMe(signedIn.me) };
  const { authenticator, passkeys, recoveryCodesLeft } = signedIn.secondFactors;
  return {
    state: 'second-factor',
    ways: [
      ...(authenticator ? (['authenticator'] as const) : []),
      ...(passkeys > 0 ? (['passkey'] as const) : []),
      ...(recoveryCodesLeft > 0 ? (['recovery-code'] as const) : []),
    ],
  };
}

export function presentSession({ publicId, startedAt, lastSeenAt, device, strength }: Session, currentId: string): SessionItem {
  return { id: publicId, current: publicId === currentId, startedAt, lastSeenAt, device, secondFactor: strength === 'second-factor' };
}

/** A stored document as plain JSON. */
function asJson(document: unknown): Json {
  return z.json().parse(document);
}

/** Everything on record about a member, as data. Field by field: what is secret or about somebody else is not among them. */
export function presentMine(mine: MineOnRecord): Record<string, Json> {
  const { member, makers, sessions, secondFactors, passkeys, notices, noticeChoices, letters, entered, contributions, comments, flags, acts } = mine;
  const { parts, marks, readings, photos } = mine;
  return {
    account: {
      id: member.id,
      displayName: member.displayName,
      email: member.email,
      emailVerifiedAt: member.emailVerifiedAt,
      joinedAt: member.joinedAt,
      role: member.role,
      moderates: member.scope === 'all' ? 'all' : makers.map(({ slug }) => slug),
    },
    secondFactors: {
      inUse: hasSecondFactor(secondFactors),
      authenticator: secondFactors.authenticator,
      recoveryCodesLeft: secondFactors.recoveryCodesLeft,
      passkeys: passkeys.map(({ name, addedAt, lastUsedAt }) => ({ name, addedAt, lastUsedAt })),
    },
    sessions: sessions.map(({ startedAt, lastSeenAt, device, strength }) => ({ startedAt, lastSeenAt, device, strength })),
    notices: notices.map(({ kind, title, body, href, at, readAt }) => ({ kind, title, body, href, at, readAt })),
    noticesByEmail: noticeChoices.map(({ kind, byEmail }) => ({ kind, byEmail })),
    letters: letters.map(({ template, toAddress, state, queuedAt, settledAt }) => ({ letter: template, to: toAddress, state, queuedAt, settledAt })),
    entered: {
      facts: entered.facts.map(({ factId, kind, number, enteredAt, reason, payload }) => ({
        fact: factId,
        kind,
        version: number,
        enteredAt,
        reason,
        payload: asJson(payload),
      })),
      ciphers: entered.ciphers.map(({ cipherId, number, enteredAt, reason, definition }) => ({
        cipher: cipherId,
        version: number,
        enteredAt,
        reason,
        definition: asJson(definition),
      })),
      sources: entered.sources.map(({ slug, kind, title, enteredAt, note }) => ({ slug, kind, title, enteredAt, note })),
    },
    contributions: contributions.map(({ id, kind, subjectId, title, state, payload, citations, note, startedAt, putForwardAt, decidedAt }) => ({
      contribution: id,
      kind,
      fact: subjectId,
      title,
      state,
      payload: asJson(payload),
      sources: asJson(citations),
      note,
      startedAt,
      putForwardAt,
      decidedAt,
    })),
    comments: comments.map(({ contributionId, at, path, text }) => ({ contribution: contributionId, at, path, text })),
    flags: flags.map(({ factId, at, reason, outcome }) => ({ fact: factId, at, reason, outcome })),
    parts: parts.map((part) => ({
      part: part.id,
      type: part.partType?.slug ?? null,
      called: part.called,
      maker: part.maker?.slug ?? null,
      foundOn: { model: part.foundModel?.slug ?? null, serial: part.foundSerial },
      condition: part.condition,
      note: part.note,
      visibility: part.visibility,
      recordedAt: part.recordedAt,
      photos: loaded(part.photos).map(({ photoId }) => photoId),
    })),
    marks: marks.map((mark) => ({
      mark: mark.id,
      part: mark.partId,
      kind: mark.kind,
      technique: mark.technique,
      photos: loaded(mark.photos).map(({ photoId, regionLeft, regionTop, regionWidth, regionHeight, turn, mirrored }) => ({
        photo: photoId,
        region: regionLeft === null ? null : { left: regionLeft, top: regionTop, width: regionWidth, height: regionHeight },
        turn,
        mirrored,
      })),
    })),
    readings: readings.map(({ id, markId, text, madeAt, independent, asHolder, takenBackAt }) => ({
      reading: id,
      mark: markId,
      text,
      madeAt,
      independent,
      asHolder,
      takenBackAt,
    })),
    photos: photos.map(({ id, name, takenOn, addedAt, address, picture }) => ({
      photo: id,
      name,
      takenOn,
      addedAt,
      address,
      bytes: Number(loaded(picture).bytes),
      width: loaded(picture).width,
      height: loaded(picture).height,
    })),
    acts: acts.map(({ at, act, actorId, subjectId, detail }) => ({
      at,
      act,
      byMe: actorId === member.id,
      aboutMe: subjectId === member.id,
      detail: asJson(detail),
    })),
  };
}
