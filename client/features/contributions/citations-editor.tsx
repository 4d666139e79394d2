import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import type { LoosePayload } from '#contract/contributions.ts';
import { FACT_LIMITS } from '#contract/kinds/kind.ts';
import type { FactField, KindForm } from '#contract/kinds/kind.ts';
import { SourceKind } from '#contract/common.ts';
import { SOURCE_KINDS } from '#domain/vocabulary.ts';
import { capital } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { saySourceKind } from '../sources/say-source.ts';
import { Chooser } from './chooser.tsx';
import { sourceChoices } from './contributions-queries.ts';
import { useFaultAt, useSurroundings } from './draft-context.ts';
import { controlId } from './draft-faults.ts';
import { DraftField } from './draft-field.tsx';
import { objectOf, rowsOf, textOf } from './draft-values.ts';
import { fieldsOfSource, kindOfSource, sayLocator, sourceOfKind } from './source-fields.ts';

type Props = {
  readonly form: KindForm;
  readonly citations: readonly LoosePayload[];
  readonly onChange: (citations: readonly LoosePayload[]) => void;
};

const KNOWN: LoosePayload = { sourceId: null, newSource: null, field: null, locator: null, note: null };

/** What stands behind the contribution: sources the register has, and new ones; each behind the whole or one field of it. */
export function CitationsEditor({ form, citations, onChange }: Props) {
  const fault = useFaultAt(['citations']);
  const [removed, setRemoved] = useState<{ readonly citation: LoosePayload; readonly place: number } | null>(null);
  const added = useRef<string | null>(null);
  useEffect(() => {
    if (added.current !== null) document.getElementById(added.current)?.focus();
    added.current = null;
  });
  const add = (citation: LoosePayload, control: string): void => {
    onChange([...citations, citation]);
    added.current = controlId(['citations', citations.length, ...control.split('.')]);
  };
  return (
    <div id={controlId(['citations'])} tabIndex={-1} className="max-w-[680px] outline-none">
      {fault !== null && <p className="mb-3 font-semibold text-scale">{fault}</p>}
      <ol>
        {citations.map((citation, place) => (
          <li key={place} className="border-t border-rule py-4 first:border-t-0 first:pt-0">
            <div className="flex flex-wrap items-center justify-between gap-x-4">
              <p className="font-semibold">Source {place + 1}</p>
              <button
                type="button"
                className="min-h-11 cursor-pointer text-[15px] text-temper underline"
                onClick={() => {
                  onChange(citations.toSpliced(place, 1));
                  setRemoved({ citation, place });
                }}
              >
                Take out<span className="sr-only">: source {place + 1}</span>
              </button>
            </div>
            <CitationFields form={form} citation={citation} place={place} onChange={(next) => onChange(citations.with(place, next))} />
          </li>
        ))}
      </ol>
      {removed !== null && (
        <p role="status" className="mb-3 flex flex-wrap items-center gap-x-4 border-l-4 border-temper bg-bed px-3 py-1">
          Source {removed.place + 1} was taken out.
          <button
            type="button"
            className="min-h-11 cursor-pointer text-temper underline"
            onClick={() => {
              onChange(citations.toSpliced(removed.place, 0, removed.citation));
              setRemoved(null);
            }}
          >
            Put it back
          </button>
        </p>
      )}
      {citations.length < FACT_LIMITS.rows && (
        <div className="flex flex-wrap gap-3">
          <Button onClick={() => add(KNOWN, 'sourceId')}>Cite a source on record</Button>
          <Button onClick={() => add({ ...KNOWN, newSource: sourceOfKind('book', {}) }, 'newSource.kind')}>Describe a new source</Button>
        </div>
      )}
    </div>
  );
}

type CitationProps = { readonly form: KindForm; readonly citation: LoosePayload; readonly place: number; readonly onChange: (citation: LoosePayload) => void };

const REMARK: FactField = { key: 'note', label: 'Remark', hint: 'What it says, or how far to trust it', control: 'line', optional: true };

function CitationFields({ form, citation, place, onChange }: CitationProps) {
  const at = (key: string) => ['citations', place, key];
  const source = objectOf(citation['newSource']);
  const kind = source === null ? null : kindOfSource(source);
  const locator: FactField = { key: 'locator', label: sayLocator(kind), control: 'line', ...(kind === 'book' ? {} : { optional: true }) };
  return (
    <>
      {source === null ? (
        <KnownSource citation={citation} place={place} onChange={onChange} />
      ) : (
        <NewSourceFields source={source} place={place} onChange={(next) => onChange({ ...citation, newSource: next })} />
      )}
      <div className="grid gap-x-4 gap-y-2 roomy:grid-cols-2">
        <DraftField field={locator} path={at('locator')} value={citation['locator']} onChange={(value) => onChange({ ...citation, locator: value === '' ? null : value })} />
        <BehindField form={form} citation={citation} place={place} onChange={onChange} />
      </div>
      <DraftField field={REMARK} path={at('note')} value={citation['note']} onChange={(note) => onChange({ ...citation, note })} />
    </>
  );
}

function KnownSource({ citation, place, onChange }: Omit<CitationProps, 'form'>) {
  const { nameOf, learnName } = useSurroundings();
  const path = ['citations', place, 'sourceId'];
  const error = useFaultAt(path);
  const [text, setText] = useState<string | null>(null);
  const found = useQuery(sourceChoices(text));
  const id = textOf(citation['sourceId']);
  return (
    <Chooser
      id={controlId(path)}
      label="Source"
      error={error}
      chosen={id === '' ? null : { id, title: nameOf(id) ?? 'A source the register no longer has' }}
      found={found.data?.items.map((item) => ({ id: item.id, title: item.title, detail: saySourceKind(item.kind) }))}
      failure={found.error}
      onAgain={() => void found.refetch()}
      onSearch={setText}
      onChoose={(choice) => {
        if (choice !== null) learnName(choice.id, choice.title);
        onChange({ ...citation, sourceId: choice?.id ?? null });
      }}
      none="No source of that name is on record. Take this one out and describe a new one."
    />
  );
}

function NewSourceFields({ source, place, onChange }: { readonly source: LoosePayload; readonly place: number; readonly onChange: (source: LoosePayload) => void }) {
  const kind = kindOfSource(source);
  const path = ['citations', place, 'newSource'];
  return (
    <div className="grid gap-x-4 gap-y-2 roomy:grid-cols-2">
      <SelectField
        id={controlId([...path, 'kind'])}
        label="Kind of source"
        value={kind}
        onChange={({ target }) => onChange(sourceOfKind(SourceKind.parse(target.value), source))}
      >
        {SOURCE_KINDS.map((one) => (
          <option key={one} value={one}>
            {capital(one === 'own-knowledge' ? 'my own knowledge' : saySourceKind(one))}
          </option>
        ))}
      </SelectField>
      {fieldsOfSource(kind).map((field) => (
        <div key={field.key} className={field.control === 'prose' ? 'col-span-full' : ''}>
          <DraftField field={field} path={[...path, field.key]} value={source[field.key]} onChange={(value) => onChange({ ...source, [field.key]: value })} />
        </div>
      ))}
    </div>
  );
}

/** What the source stands behind: the whole, a field, or one row of a list. */
function BehindField({ form, citation, place, onChange }: CitationProps) {
  const { payload } = useSurroundings();
  const path = ['citations', place, 'field'];
  const error = useFaultAt(path);
  const parts = form.fields.flatMap((field) => [
    { value: field.key, label: field.label },
    ...(field.control === 'rows' ? rowsOf(payload[field.key]).map((_, row) => ({ value: `${field.key}.${row + 1}`, label: `${field.label}: ${field.row} ${row + 1}` })) : []),
  ]);
  const behind = textOf(citation['field']);
  return (
    <SelectField
      id={controlId(path)}
      label="Stands behind"
      error={error}
      value={behind}
      onChange={({ target }) => onChange({ ...citation, field: target.value === '' ? null : target.value })}
    >
      <option value="">All of it</option>
      {!parts.some(({ value }) => value === behind) && behind !== '' && <option value={behind}>Another part: {behind}</option>}
      {parts.map(({ value, label }) => (
        <option key={value} value={value}>
          {label}
        </option>
      ))}
    </SelectField>
  );
}
