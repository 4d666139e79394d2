import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { SubmitEvent } from 'react';
import { LIMITS } from '#contract/limits.ts';
import type { ModelItem, ModelPage } from '#contract/models.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayFailure } from '../../lib/say-failure.ts';
import { Button } from '../../ui/button.tsx';
import { ErrorSummary } from '../../ui/error-summary.tsx';
import type { SummaryFault } from '../../ui/error-summary.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { modelsToChoose } from './decode-queries.ts';
import type { DecodeState } from './decode-state.ts';
import type { ChangeState } from './use-decode-state.ts';

const IDS = { model: 'machine-model', serial: 'machine-serial' } as const;

type Props = { readonly state: DecodeState; readonly change: ChangeState; readonly model: ModelPage | null; /** What the register said of the serial. */ readonly refused: unknown };

/** Which machine: its model, its serial as stamped, and where on it the part sits. */
export function MachineForm({ state, change, model, refused }: Props) {
  const [faults, setFaults] = useState<readonly SummaryFault[]>([]);
  const messageFor = (id: string) => faults.find(({ controlId }) => controlId === id)?.message ?? null;
  const onSubmit = (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const typed = new FormData(event.currentTarget).get('serial');
    const serial = typeof typed === 'string' ? typed.trim() : '';
    const found: SummaryFault[] = [
      ...(state.model === null ? [{ message: 'Choose the model of the machine', controlId: IDS.model }] : []),
      ...(serial === '' ? [{ message: 'Type the serial as it is stamped', controlId: IDS.serial }] : []),
    ];
    setFaults(found);
    if (found.length === 0 && serial !== state.serial) change({ serial });
  };
  return (
    <form onSubmit={onSubmit} noValidate>
      {faults.length > 0 && <ErrorSummary title="To hold the mark against a machine" faults={faults} />}
      <div className="grid gap-x-5 roomy:grid-cols-2">
        <ModelField state={state} change={change} fault={messageFor(IDS.model)} />
        <TextField
          id={IDS.serial}
          key={state.serial}
          label="Serial as stamped"
          name="serial"
          mono
          defaultValue={state.serial}
          maxLength={LIMITS.serial}
          autoComplete="off"
          autoCapitalize="characters"
          spellCheck={false}
          hint="Letters, figures and spaces as they stand"
          error={messageFor(IDS.serial) ?? serialFault(refused)}
        />
        <PositionField state={state} change={change} model={model} />
        <div className="pt-3 roomy:pt-8">
          <Button type="submit" weight="primary" className="w-full roomy:w-auto">
            Check the fit
          </Button>
        </div>
      </div>
    </form>
  );
}

function ModelField({ state, change, fault }: { readonly state: DecodeState; readonly change: ChangeState; readonly fault: string | null }) {
  const models = useQuery(modelsToChoose());
  const list = ownFirst(models.data ?? [], state.maker);
  const unknown = models.isSuccess && state.model !== null && !models.data.some(({ slug }) => slug === state.model);
  return (
    <SelectField
      id={IDS.model}
      label="Model"
      value={state.model ?? ''}
      onChange={(event) => change({ model: event.target.value === '' ? null : event.target.value })}
      error={fault ?? (models.isError ? sayFailure(models.error).title : unknown ? 'No such model is on record; choose another' : null)}
    >
      <option value="">Choose a model</option>
      {state.model !== null && !list.some(({ slug }) => slug === state.model) && <option value={state.model}>{state.model}</option>}
      {byMaker(list).map(([maker, ofMaker]) => (
        <optgroup key={maker} label={maker}>
          {ofMaker.map(({ slug, name }) => (
            <option key={slug} value={slug}>
              {name}
            </option>
          ))}
        </optgroup>
      ))}
    </SelectField>
  );
}

function PositionField({ state, change, model }: { readonly state: DecodeState; readonly change: ChangeState; readonly model: ModelPage | null }) {
  return (
    <SelectField
      label="Where the part sits"
      value={state.position ?? ''}
      disabled={state.model === null}
      onChange={(event) => change({ position: event.target.value === '' ? null : event.target.value })}
      hint={state.model === null ? 'Choose the model first' : 'Gives the time accepted between casting and building'}
    >
      <option value="">Not said</option>
      {state.position !== null && model === null && <option value={state.position}>{state.position}</option>}
      {model?.positions.map(({ slug, name }) => (
        <option key={slug} value={slug}>
          {name}
        </option>
      ))}
    </SelectField>
  );
}

/** The maker's own models first. The others stay, since a founder casts for other makers as well. */
function ownFirst(models: readonly ModelItem[], maker: string | null): readonly ModelItem[] {
  return [...models.filter((one) => one.maker.slug === maker), ...models.filter((one) => one.maker.slug !== maker)];
}

function byMaker(models: readonly ModelItem[]): [string, ModelItem[]][] {
  const groups = new Map<string, ModelItem[]>();
  for (const model of models) groups.set(model.maker.name, [...(groups.get(model.maker.name) ?? []), model]);
  return [...groups];
}

function serialFault(refused: unknown): string | null {
  if (!(refused instanceof ProblemError)) return null;
  return refused.faults.find(({ path }) => path.includes('serial'))?.message ?? null;
}
