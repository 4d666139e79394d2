import { useQuery } from '@tanstack/react-query';
import { sayFailure } from '../../lib/say-failure.ts';
import { CheckField } from '../../ui/check-field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { useDraft } from '../../lib/use-draft.ts';
import { ciphersToChoose, makersToChoose } from './decode-queries.ts';
import { yearFault, yearsFault } from './decode-state.ts';
import type { DecodeState } from './decode-state.ts';
import type { ChangeState } from './use-decode-state.ts';

/** Whose mark it is, where known, and what else narrows or widens the reading. */
export function CipherChoice({ state, change }: { readonly state: DecodeState; readonly change: ChangeState }) {
  return (
    <div className="mt-5">
      <div className="grid gap-x-5 roomy:grid-cols-2">
        <MakerField state={state} change={change} />
        <CipherField state={state} change={change} />
      </div>
      <Narrowing state={state} change={change} />
    </div>
  );
}

function MakerField({ state, change }: { readonly state: DecodeState; readonly change: ChangeState }) {
  const makers = useQuery(makersToChoose());
  const list = makers.data ?? [];
  const unknown = makers.isSuccess && state.maker !== null && !list.some(({ slug }) => slug === state.maker);
  return (
    <SelectField
      label="Maker"
      value={state.maker ?? ''}
      onChange={(event) => change({ maker: event.target.value === '' ? null : event.target.value })}
      error={makers.isError ? sayFailure(makers.error).title : unknown ? 'No such maker is on record; choose another' : null}
      hint={state.maker === null ? 'Every cipher on record is tried' : undefined}
    >
      <option value="">Not known</option>
      {state.maker !== null && !list.some(({ slug }) => slug === state.maker) && <option value={state.maker}>{makers.isPending ? 'Loading…' : state.maker}</option>}
      {list.map(({ slug, name }) => (
        <option key={slug} value={slug}>
          {name}
        </option>
      ))}
    </SelectField>
  );
}

/** Only where the maker had more than one. */
function CipherField({ state, change }: { readonly state: DecodeState; readonly change: ChangeState }) {
  const ciphers = useQuery(ciphersToChoose(state.maker));
  const list = ciphers.data ?? [];
  if (state.maker === null || (list.length < 2 && state.cipher === null)) return null;
  const unknown = ciphers.isSuccess && state.cipher !== null && !list.some(({ slug }) => slug === state.cipher);
  return (
    <SelectField
      label="Cipher"
      value={state.cipher ?? ''}
      onChange={(event) => change({ cipher: event.target.value === '' ? null : event.target.value })}
      error={unknown ? 'This maker has no such cipher; choose another' : null}
    >
      <option value="">Any of this maker’s</option>
      {unknown && <option value={state.cipher}>{state.cipher}</option>}
      {list.map(({ slug, title }) => (
        <option key={slug} value={slug}>
          {title}
        </option>
      ))}
    </SelectField>
  );
}

function Narrowing({ state, change }: { readonly state: DecodeState; readonly change: ChangeState }) {
  const [fromYear, setFromYear] = useDraft(state.fromYear, (text) => change({ fromYear: text }, 'typed'));
  const [toYear, setToYear] = useDraft(state.toYear, (text) => change({ toYear: text }, 'typed'));
  const set = state.lookAlikes || state.fromYear !== '' || state.toYear !== '';
  return (
    <details {...(set ? { open: true } : {})}>
      <summary className="inline-flex min-h-11 cursor-pointer items-center text-slag underline underline-offset-4">Years and look-alikes</summary>
      <div className="grid gap-x-5 pt-2 roomy:grid-cols-[auto_auto_1fr]">
        <TextField label="Not before" value={fromYear} onChange={(event) => setFromYear(event.target.value)} error={yearFault(fromYear)} {...YEAR} />
        <TextField label="Not after" value={toYear} onChange={(event) => setToYear(event.target.value)} error={yearsFault({ ...state, fromYear, toYear })} {...YEAR} />
        <div className="roomy:pt-8">
          <CheckField
            label="Allow for look-alikes"
            hint="A worn R looks like a P, an 8 like a 3. Each clear glyph is then taken as probably right, not surely."
            checked={state.lookAlikes}
            onChange={(event) => change({ lookAlikes: event.target.checked })}
          />
        </div>
      </div>
    </details>
  );
}

const YEAR = { inputMode: 'numeric', maxLength: 4, autoComplete: 'off' } as const;
