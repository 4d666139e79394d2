import { useQuery, useQueryClient } from '@tanstack/react-query';
import { markRegistersReading } from '#contract/facts.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { Icon } from '../../ui/icon.tsx';
import { modelPage } from '../models/models-queries.ts';
import type { Account, ModelSeries } from '../models/serial-rows.ts';
import { ActTrouble } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import { InlineStep } from '../people/inline-step.tsx';
import { me } from '../people/people-queries.ts';
import { explainConflict } from './explain-conflict.ts';
import { ReasonBox } from './reason-box.tsx';

type Props = { readonly series: ModelSeries; /** Several, the register's reading first. */ readonly accounts: readonly Account[] };

/** The accounts that say when one series was built, with the one the register goes by marked; a moderator of the maker can move the mark. */
export function RivalAccounts({ series, accounts }: Props) {
  const mayMove = useMayMove(series);
  return (
    <ul aria-label="Accounts of these serials" className="mb-6 border-t border-graphite">
      {accounts.map((account, place) => (
        <li key={account.id} className="border-b border-rule py-2">
          <p className="flex flex-wrap items-baseline gap-x-4">
            <span>
              <span className="text-slag">{account.preferred ? '' : `Account ${place + 1}: `}</span>
              {account.title}
            </span>
            {account.preferred && (
              <span className="inline-flex items-center gap-1.5 font-semibold text-verdigris">
                <Icon name="check" /> The register’s reading
              </span>
            )}
          </p>
          {mayMove && !account.preferred && (
            <div className="no-print my-2">
              <InlineStep label="Make it the register’s reading">{(close) => <ReadingForm series={series} account={account} onDone={close} />}</InlineStep>
            </div>
          )}
        </li>
      ))}
    </ul>
  );
}

/** Whether whoever is at the page decides for the maker of these serials. */
function useMayMove({ ranges }: ModelSeries): boolean {
  const { data: viewer } = useQuery(me());
  const [range] = ranges;
  const decides = viewer?.can.decideContributions === true;
  const { data: model } = useQuery({ ...modelPage(range?.model.slug ?? ''), enabled: decides && range !== undefined });
  if (!decides || model === undefined) return false;
  return viewer.moderates === null || viewer.moderates.some(({ slug }) => slug === model.maker.slug);
}

function ReadingForm({ series, account, onDone }: { readonly series: ModelSeries; readonly account: Account; readonly onDone: () => void }) {
  const queryClient = useQueryClient();
  const form = useContractForm({
    schema: markRegistersReading.body,
    fields: { reason: 'Reason' },
    read: (data) => ({ accountId: account.id, reason: data.get('reason') }),
    send: (body) => call(markRegistersReading, { params: { id: series.id }, body }),
    onDone: () => {
      onDone();
      void queryClient.invalidateQueries();
    },
  });
  return (
    <>
      <p className="mb-3">Build windows and fits of every machine of this series go by it from then on, and are worked out again.</p>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="The register’s reading is the same as before" explain={explainConflict} />
        <ReasonBox {...form.field('reason')} hint="It is written down, with your name." />
        <Button type="submit" disabled={form.busy}>
          Go by this account
        </Button>
      </form>
    </>
  );
}
