import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { CipherDefinitionSchema } from '#contract/cipher.ts';
import type { FactRef, LoosePayload } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import type { FactField } from '#contract/kinds/kind.ts';
import { parseDay } from '#domain/dates/day.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { sayOpenSpan } from '../../lib/say-date.ts';
import { today } from '../../lib/today.ts';
import { NoteRef } from '../../ui/margin-notes.tsx';
import { CipherLayout } from '../ciphers/cipher-layout.tsx';
import { SymbolSets } from '../ciphers/symbol-sets.tsx';
import { accountNames } from './contributions-queries.ts';
import { endsOf, isBlank, rowsOf, textOf } from './draft-values.ts';
import type { Value } from './draft-values.ts';
import { pathOfRef } from './path-of-ref.ts';

export type Names = readonly FactRef[];

type Props = {
  readonly kind: FactKind;
  readonly payload: LoosePayload;
  readonly names: Names;
  /** Numbers of the margin notes behind a field. */
  readonly notesOf?: (field: string) => readonly number[];
};

/** A whole entry, field by field as its form asks for them; what it says nothing of is left out. */
export function PayloadList({ kind, payload, names, notesOf = () => [] }: Props) {
  const said = formOf(kind).fields.filter(({ key }) => !isBlank(payload[key]));
  if (said.length === 0) return <p className="border-y border-rule py-3 text-slag">It says nothing yet.</p>;
  return (
    <dl>
      {said.map((field) => (
        <div key={field.key} className={`break-inside-avoid border-b border-rule py-3 ${field.control === 'cipher' ? '' : 'grid gap-x-4 roomy:grid-cols-[184px_minmax(0,1fr)]'}`}>
          <dt className="text-slag italic">
            {field.label}
            <NoteRef numbers={notesOf(field.key)} />
          </dt>
          <dd className="min-w-0 wrap-anywhere">
            <PayloadValue field={field} value={payload[field.key]} names={names} />
          </dd>
        </div>
      ))}
    </dl>
  );
}

/** One value as people read it: names for ids, words for choices, days as days. */
export function PayloadValue({ field, value, names }: { readonly field: FactField; readonly value: Value | undefined; readonly names: Names }) {
  if (isBlank(value)) return <span className="text-slag italic">nothing</span>;
  switch (field.control) {
    case 'line':
    case 'whole':
      return <span className={field.control === 'whole' || field.mono === true ? 'font-mono' : ''}>{textOf(value)}</span>;
    case 'prose':
      return <span className="whitespace-pre-line">{textOf(value)}</span>;
    case 'number':
      return `${textOf(value)}${field.unit === undefined ? '' : ` ${field.unit}`}`;
    case 'yes-no':
      return value === true ? 'yes' : 'no';
    case 'choice':
      return field.choices.find((choice) => choice.value === value)?.label ?? textOf(value);
    case 'days':
      return saySpanOfDays(value);
    case 'numbers':
      return <span className="font-mono">{sayEnds(value)}</span>;
    case 'counts':
      return `${sayEnds(value)}${field.unit === '' ? '' : ` ${field.unit}`}`;
    case 'fact':
      return <Named id={textOf(value)} names={names} />;
    case 'account':
      return <AccountName id={textOf(value)} />;
    case 'rows':
      return <Rows field={field} value={value} names={names} />;
    case 'cipher':
      return <Layout value={value} />;
  }
}

function Named({ id, names }: { readonly id: string; readonly names: Names }) {
  const ref = names.find((one) => one.id === id);
  return ref === undefined ? 'an entry on record' : <Link to={pathOfRef(ref)}>{ref.title}</Link>;
}

/** Accounts are no facts, and so not among the names. */
function AccountName({ id }: { readonly id: string }) {
  return useQuery(accountNames(true)).data?.find((account) => account.id === id)?.title ?? 'an account on record';
}

function Rows({ field, value, names }: { readonly field: Extract<FactField, { readonly control: 'rows' }>; readonly value: Value | undefined; readonly names: Names }) {
  return (
    <ol className="space-y-1">
      {rowsOf(value).map((row, place) => (
        <li key={place}>
          {field.columns
            .filter(({ key }) => !isBlank(row[key]))
            .map((column, at) => (
              <span key={column.key}>
                {at > 0 && ': '}
                <PayloadValue field={column} value={row[column.key]} names={names} />
              </span>
            ))}
        </li>
      ))}
    </ol>
  );
}

function Layout({ value }: { readonly value: Value | undefined }) {
  const parsed = CipherDefinitionSchema.safeParse(value);
  if (!parsed.success) return <span className="text-slag">The layout is not whole yet.</span>;
  return (
    <div className="space-y-6 pt-3">
      <CipherLayout definition={parsed.data} />
      <SymbolSets definition={parsed.data} asOf={today()} />
    </div>
  );
}

function saySpanOfDays(value: Value | undefined): string {
  const { from, to } = endsOf(value);
  const areDays = [from, to].every((end) => end === null || (typeof end === 'string' && parseDay(end).ok));
  return areDays ? sayOpenSpan({ from: from === null ? null : textOf(from), to: to === null ? null : textOf(to) }) : sayEnds(value);
}

function sayEnds(value: Value | undefined): string {
  const { from, to } = endsOf(value);
  if (isBlank(from)) return `up to ${textOf(to)}`;
  return isBlank(to) ? `${textOf(from)} on` : `${textOf(from)}–${textOf(to)}`;
}
