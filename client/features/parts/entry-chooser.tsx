import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { factChoices } from '../contributions/contributions-queries.ts';
import { Chooser } from '../contributions/chooser.tsx';
import type { FieldProps } from '../../ui/field.tsx';
import type { PartDraft } from './part-draft.ts';

type Props = FieldProps & {
  readonly of: 'part-type' | 'maker' | 'model';
  readonly value: PartDraft['partType'];
  readonly onChange: (chosen: PartDraft['partType']) => void;
  /** What to do where the catalogue has none. */
  readonly none: string;
};

/** An entry of the catalogue, by name. */
export function EntryChooser({ of, value, onChange, none, ...field }: Props) {
  const [text, setText] = useState<string | null>(null);
  const found = useQuery(factChoices(of, text, null));
  return (
    <Chooser
      {...field}
      chosen={value}
      found={found.data?.items.map(({ id, title, maker }) => ({ id, title, ...(maker === null || title.includes(maker.name) ? {} : { detail: maker.name }) }))}
      failure={found.error}
      onAgain={() => void found.refetch()}
      onSearch={setText}
      onChoose={(choice) => onChange(choice === null ? null : { id: choice.id, title: choice.title })}
      none={none}
    />
  );
}
