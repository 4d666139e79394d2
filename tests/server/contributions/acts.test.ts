import fc from 'fast-check';
import { expect, test } from 'vitest';
import { ContributionPage } from '#contract/contributions.ts';
import { FactName } from '#db/models/fact-name.ts';
import { FactSource } from '#db/models/fact-source.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import { decide, entered, factCalled, historyOf, OWN_KNOWLEDGE, replayTrail, someone } from '#tests/support/contributing.ts';
import { usePeople } from '#tests/support/people.ts';

const people = usePeople();

/** What somebody tries, whether or not it can be done then. `version` counts back from the latest. */
const Act = fc.oneof(
  fc.record({ do: fc.constant('enter' as const), back: fc.constant(0) }),
  fc.record({ do: fc.constant('turn-down' as const), back: fc.constant(0) }),
  fc.record({ do: fc.constant('bring-back' as const), back: fc.nat(3) }),
  fc.record({ do: fc.constant('retire' as const), back: fc.constant(0) }),
  // On what they saw before the last act.
  fc.record({ do: fc.constant('retire-late' as const), back: fc.constant(0) }),
);

test('whatever is done in whatever order, one version is in force or none, and the trail tells the same', async () => {
  const [author, moderator] = [await someone(people), await someone(people, { role: 'moderator' })];
  const makerId = await factCalled(people, 'maker', 'Brackwater Tractor Works');
  let made = 0;
  await fc.assert(
    fc.asyncProperty(fc.array(Act, { minLength: 2, maxLength: 6 }), async (acts) => {
      made += 1;
      const payload = { makerId, name: `Bay ${made}`, place: null, note: null };
      const factId = await entered(author, moderator, { kind: 'works', payload });
      let seenBefore: number | null = 1;
      for (const [place, act] of acts.entries()) {
        const { inForce, steps } = await historyOf(author, factId);
        const latest = steps[0]?.version ?? 0;
        const at = `/api/facts/${factId}`;
        if (act.do === 'enter' || act.do === 'turn-down') {
          const body = { kind: 'works', subjectId: factId, payload: { ...payload, note: `Said ${place} times` }, sources: [OWN_KNOWLEDGE] };
          const draft = await author.browser.post('/api/contributions').send(body);
          expect(draft.status).toBe(inForce === null ? 409 : 201);
          if (draft.status !== 201) continue;
          const { id, revision } = ContributionPage.parse(draft.body);
          const put = ContributionPage.parse((await author.browser.post(`/api/contributions/${id}/put-forward`).send({ revision }).expect(200)).body);
          await decide(moderator, put, act.do).expect(200);
        } else if (act.do === 'bring-back') {
          const version = Math.max(1, latest - act.back);
          const { status } = await moderator.browser.post(`${at}/bring-back`).send({ version, reason: 'It was right', inForce });
          expect(status).toBe(version === inForce ? 409 : 200);
        } else {
          const lookedAt = act.do === 'retire' ? inForce : seenBefore;
          const { status } = await moderator.browser.post(`${at}/retire`).send({ reason: 'It was wrong', inForce: lookedAt ?? 1 });
          expect(status).toBe(inForce !== null && lookedAt === inForce ? 200 : 409);
        }
        seenBefore = inForce;
      }

      const { inForce, steps } = await historyOf(author, factId);
      const versions = await FactVersion.query(people.knex).where({ factId }).orderBy('number');
      expect(versions.map(({ number }) => number)).toEqual(versions.map((_, place) => place + 1));
      const standing = versions.filter(({ supersededAt }) => supersededAt === null).map(({ number }) => number);
      expect(standing).toEqual(inForce === null ? [] : [versions.length]);
      const name = await FactName.query(people.knex).findById(factId);
      expect(name === undefined).toBe(inForce === null);
      expect((await FactSource.query(people.knex).where({ factId }).resultSize()) > 0).toBe(inForce !== null);
      expect(steps.filter(({ inForce: stands }) => stands).map(({ version }) => version)).toEqual(standing);
      expect((await replayTrail(people)).get(factId)).toBe(inForce);
    }),
    { numRuns: 8 },
  );
}, 60_000);
