import { useMemo } from 'react';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayFailure } from '../../lib/say-failure.ts';
import type { FormFault } from '../../lib/use-contract-form.ts';
import { ErrorSummary } from '../../ui/error-summary.tsx';
import type { SummaryFault } from '../../ui/error-summary.tsx';

export type Explanation = { readonly title: string; readonly advice: string };

type Props = {
  readonly form: { readonly faults: readonly FormFault[]; readonly failure: Error | null };
  /** What the form was to do: `Nothing was changed yet`. */
  readonly title: string;
  /** Words of this form's own for some failures; null for the usual ones. */
  readonly explain?: (problem: ProblemError) => Explanation | null;
};

/** What went wrong with a form, at its head. That one has to prove who one is first is said by `ActTrouble`, which asks for it. */
export function FormTrouble({ form: { faults, failure }, title, explain }: Props) {
  if (faults.length > 0) return <Faulty title={title} faults={faults} />;
  if (failure === null || wantsProof(failure)) return null;
  return <Failed failure={failure} own={failure instanceof ProblemError ? (explain?.(failure) ?? null) : null} />;
}

/** Each fault with the name of its box, as it stands apart from it here. */
function Faulty({ title, faults }: { readonly title: string; readonly faults: readonly FormFault[] }) {
  const named = useMemo(
    () => faults.map(({ message, control }): SummaryFault => (control === null ? { message, controlId: null } : { message: `${control.label}: ${message}`, controlId: control.id })),
    [faults],
  );
  return <ErrorSummary title={title} faults={named} />;
}

const NO_FAULTS: readonly SummaryFault[] = [];

function Failed({ failure, own }: { readonly failure: Error; readonly own: Explanation | null }) {
  const said = sayFailure(failure);
  const { title, advice } = own ?? said;
  return (
    <ErrorSummary title={title} faults={NO_FAULTS}>
      <p>{advice}</p>
      {own === null && said.requestId !== null && (
        <p className="text-[15px] text-slag">
          Number of this request: <span className="font-mono">{said.requestId}</span>
        </p>
      )}
    </ErrorSummary>
  );
}

/** The register asks for a proof of who is at the page before it does this. */
export function wantsProof(failure: Error | null): boolean {
  return failure instanceof ProblemError && failure.kind === 'identity-not-confirmed';
}
