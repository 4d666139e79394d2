import type { FactHistory } from '#contract/facts.ts';
import { Icon } from '../../ui/icon.tsx';
import { Block } from '../../ui/page-grid.tsx';
import { DifferencesTable } from '../contributions/differences-table.tsx';
import { PayloadList } from '../contributions/payload-list.tsx';
import { InlineStep } from '../people/inline-step.tsx';
import { BringBackForm } from './history-deeds.tsx';
import { stepNotes } from './step-notes.tsx';
import type { Step } from './step-notes.tsx';

type Props = { readonly step: Step; readonly history: FactHistory; /** Nothing was before it. */ readonly isFirst: boolean };

/** One step of a fact's history: a version with what it changed, or its retirement. */
export function HistoryStep({ step, history, isFirst }: Props) {
  const { version, inForce, reason, broughtBack } = step;
  const notes = stepNotes(step, history);
  if (step.step === 'retired') {
    return (
      <Block heading={`Version ${version} retired`} notes={notes}>
        <p className="max-w-measure whitespace-pre-line wrap-anywhere">{reason}</p>
      </Block>
    );
  }
  return (
    <Block heading={`Version ${version}`} notes={notes}>
      {inForce && (
        <p className="mb-2 flex items-center gap-1.5 font-semibold text-verdigris">
          <Icon name="check" /> In force
        </p>
      )}
      {broughtBack !== null && <p className="mb-1 text-slag">Brought version {broughtBack} back.</p>}
      <p className="mb-3 max-w-measure whitespace-pre-line wrap-anywhere">{reason}</p>
      {!isFirst && <DifferencesTable caption={`What version ${version} changed`} differences={step.differences} isChange />}
      <details className="mt-2" open={isFirst}>
        <summary className="inline-flex min-h-11 cursor-pointer items-center text-[15px] text-slag underline underline-offset-4">
          The whole entry as version {version} had it
        </summary>
        <PayloadList kind={history.fact.kind} payload={step.payload} names={history.names} />
      </details>
      {!inForce && history.can.bringBack && (
        <div className="no-print mt-3">
          <InlineStep label={`Bring version ${version} back`}>
            {(close) => <BringBackForm history={history} version={version} onDone={close} />}
          </InlineStep>
        </div>
      )}
    </Block>
  );
}
