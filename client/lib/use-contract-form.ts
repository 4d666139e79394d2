import { useMutation } from '@tanstack/react-query';
import type { UseMutationResult } from '@tanstack/react-query';
import { useId, useMemo, useRef, useState } from 'react';
import type { RefObject, SubmitEvent } from 'react';
import type { z } from 'zod';
import { faultsOf } from '#contract/faults.ts';
import type { FieldFault } from '#contract/problem.ts';
import { ProblemError } from './problem-error.ts';

/** What a form is about: the contract's schema of what it sends, and what becomes of it. */
type Purpose<Schema extends z.ZodType, Answer> = {
  readonly schema: Schema;
  /** The form's controls: name → what it is called in the summary. A fault of any other field is one of the whole form. */
  readonly fields: Readonly<Record<string, string>>;
  readonly send: (body: z.output<Schema>) => Promise<Answer>;
  readonly onDone?: (answer: Answer, body: z.output<Schema>) => void;
  /** Makes what the schema is to parse of the form; without it, each control's text under its name. */
  readonly read?: (data: FormData) => unknown;
};

export type FormFault = {
  readonly message: string;
  /** The control it is about; null for the whole form. */
  readonly control: { readonly id: string; readonly label: string } | null;
};

/** What goes on a control: native, uncontrolled, with the fault beside it. */
export type FormField = { readonly id: string; readonly name: string; readonly error: string | null };

export type ContractForm<Body, Answer> = {
  readonly form: {
    readonly ref: RefObject<HTMLFormElement | null>;
    readonly onSubmit: (event: SubmitEvent<HTMLFormElement>) => void;
    readonly noValidate: true;
  };
  readonly field: (name: string) => FormField;
  /** The same array until something changes, so that a summary takes focus once. */
  readonly faults: readonly FormFault[];
  /** What failed that is no fault of a field; null when nothing did. */
  readonly failure: Error | null;
  readonly busy: boolean;
  /** The sending itself: what it was asked, to be asked again. */
  readonly act: UseMutationResult<Answer, Error, Body>;
  /** Empties the controls, once there is nothing left to correct. */
  readonly clear: () => void;
};

/**
 * The one way a form works: the controls keep what is typed, whatever happens; on submit the contract's own schema parses it, so that
 * the form asks for what the register asks for; what the register then says of a field lands beside it, as what the schema says does.
 */
export function useContractForm<Schema extends z.ZodType, Answer>({
  schema,
  fields,
  send,
  onDone,
  read = Object.fromEntries,
}: Purpose<Schema, Answer>): ContractForm<z.output<Schema>, Answer> {
  const ownId = useId();
  const ref = useRef<HTMLFormElement>(null);
  const [refused, setRefused] = useState<readonly FieldFault[]>([]);
  // What is sent may be a password: it is forgotten with the form.
  const act = useMutation<Answer, Error, z.output<Schema>>({ mutationFn: send, gcTime: 0, ...(onDone === undefined ? {} : { onSuccess: onDone }) });
  const { error } = act;

  const faults = useMemo(() => {
    const told = refused.length > 0 ? refused : error instanceof ProblemError ? error.faults : [];
    // One at a time of each field: the first is what to mend first.
    const first = told.filter(({ path }, place) => told.findIndex((other) => other.path[0] === path[0]) === place);
    return first.map(({ path, message }): FormFault => {
      const label = fields[String(path[0])];
      return { message, control: label === undefined ? null : { id: `${ownId}-${path[0]}`, label } };
    });
    // The names are written out anew with every drawing and never change.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [refused, error, ownId]);

  return {
    form: {
      ref,
      noValidate: true,
      onSubmit: (event) => {
        event.preventDefault();
        if (act.isPending) return;
        const parsed = schema.safeParse(read(new FormData(event.currentTarget, event.nativeEvent.submitter)));
        act.reset();
        setRefused(parsed.success ? [] : faultsOf(parsed.error));
        if (parsed.success) act.mutate(parsed.data);
      },
    },
    field: (name) => {
      const id = `${ownId}-${name}`;
      return { id, name, error: faults.find(({ control }) => control?.id === id)?.message ?? null };
    },
    faults,
    failure: faults.length > 0 ? null : error,
    busy: act.isPending,
    act,
    clear: () => ref.current?.reset(),
  };
}
