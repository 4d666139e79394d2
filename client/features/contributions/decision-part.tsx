import { useQueryClient } from '@tanstack/react-query';
import { decideContribution } from '#contract/contributions.ts';
import type { ContributionPage } from '#contract/contributions.ts';
import type { Decision } from '#domain/vocabulary.ts';
import { call } from '../../lib/call.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { ReasonBox } from '../moderation/reason-box.tsx';
import { ActTrouble, SecondFactorOwed } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import type { Explanation } from '../people/form-trouble.tsx';
import { contributionPage } from './contributions-queries.ts';
import { hasMovedOn } from './draft-panels.tsx';

const DEEDS: readonly { readonly decision: Decision; readonly press: string }[] = [
  { decision: 'enter', press: 'Enter it' },
  { decision: 'send-back', press: 'Send it back' },
  { decision: 'turn-down', press: 'Turn it down' },
];

/** A moderator's decision, with its reason. That another was first is said here with what they did, and the page then shows it. */
export function DecisionPart({ contribution }: { readonly contribution: ContributionPage }) {
  const { id, revision, can } = contribution;
  const queryClient = useQueryClient();
  const form = useContractForm({
    schema: decideContribution.body,
    fields: { reason: 'Reason' },
    read: (data) => ({ decision: data.get('decision'), reason: data.get('reason'), revision }),
    send: async (body) => {
      try {
        return await call(decideContribution, { params: { id }, body });
      } catch (error) {
        if (error instanceof ProblemError && error.kind === 'conflict') await queryClient.invalidateQueries({ queryKey: contributionPage(id).queryKey });
        throw error;
      }
    },
    // Entering may change any page of the catalogue, and the queue.
    onDone: (answer) => {
      queryClient.setQueryData(contributionPage(id).queryKey, answer);
      void queryClient.invalidateQueries();
    },
  });
  const owed = form.failure instanceof ProblemError && form.failure.kind === 'second-factor-owed';
  return (
    <>
      <ActTrouble act={form.act} proofOnly />
      {owed ? <SecondFactorOwed /> : <FormTrouble form={form} title="Nothing was decided" explain={explain} />}
      {can.decide && (
        <form {...form.form} className="max-w-measure">
          <ReasonBox {...form.field('reason')} hint="Its author reads it, and it stays with what you decide." />
          <div className="flex flex-wrap gap-3">
            {DEEDS.filter(({ decision }) => decision !== 'enter' || !hasMovedOn(contribution)).map(({ decision, press }, place) => (
              <Button key={decision} type="submit" name="decision" value={decision} weight={place === 0 ? 'primary' : 'plain'} disabled={form.busy}>
                {press}
              </Button>
            ))}
          </div>
        </form>
      )}
    </>
  );
}

function explain(problem: ProblemError): Explanation | null {
  return problem.kind === 'conflict' ? { title: 'Nothing was decided', advice: problem.message } : null;
}
