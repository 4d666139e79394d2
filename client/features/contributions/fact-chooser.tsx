import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { formOf } from '#contract/kinds.ts';
import type { FactField } from '#contract/kinds/kind.ts';
import { paths } from '../../lib/paths.ts';
import type { FieldProps } from '../../ui/field.tsx';
import { accountChoices, accountNames, factChoices } from './contributions-queries.ts';
import { Chooser } from './chooser.tsx';
import { useSurroundings } from './draft-context.ts';

type Props = FieldProps & { readonly value: string | null; readonly onChange: (id: string | null) => void };

/** Another fact, by name. Where it must belong to one chosen elsewhere in the form, only such are offered, once that one is chosen. */
export function FactChooser({ field, value, onChange, ...rest }: Props & { readonly field: Extract<FactField, { readonly control: 'fact' }> }) {
  const { payload, nameOf, learnName } = useSurroundings();
  const [text, setText] = useState<string | null>(null);
  const outer = field.within === undefined ? null : payload[field.within];
  const within = typeof outer === 'string' ? outer : null;
  const found = useQuery(factChoices(field.of, text, within));
  const form = formOf(field.of);
  return (
    <Chooser
      {...rest}
      chosen={value === null ? null : { id: value, title: nameOf(value) ?? 'An entry the register no longer has' }}
      found={found.data?.items.map(({ id, title, maker }) => ({ id, title, ...(maker === null || title.includes(maker.name) ? {} : { detail: maker.name }) }))}
      failure={found.error}
      onAgain={() => void found.refetch()}
      onSearch={setText}
      onChoose={(choice) => {
        if (choice !== null) learnName(choice.id, choice.title);
        onChange(choice?.id ?? null);
      }}
      none={
        field.within !== undefined && within === null ? (
          'Choose what it belongs to first, further up.'
        ) : (
          <>
            None of that name is on record.{' '}
            <Link to={paths.contributeKind(field.of)} className="inline-flex min-h-11 items-center">
              Put {form.names.toLowerCase()} forward
            </Link>
          </>
        )
      }
    />
  );
}

/** An account of serial ranges, by name. */
export function AccountChooser({ value, onChange, ...rest }: Props) {
  const { nameOf, learnName } = useSurroundings();
  const [text, setText] = useState<string | null>(null);
  const found = useQuery(accountChoices(text));
  const known = value === null ? null : nameOf(value);
  const names = useQuery(accountNames(value !== null && known === null));
  return (
    <Chooser
      {...rest}
      chosen={value === null ? null : { id: value, title: known ?? names.data?.find(({ id }) => id === value)?.title ?? '' }}
      found={found.data?.items}
      failure={found.error}
      onAgain={() => void found.refetch()}
      onSearch={setText}
      onChoose={(choice) => {
        if (choice !== null) learnName(choice.id, choice.title);
        onChange(choice?.id ?? null);
      }}
      none="No account of that name. Leave it blank, and your first source makes one."
    />
  );
}
