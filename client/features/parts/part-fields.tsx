import type { ReactNode } from 'react';
import { LIMITS } from '#contract/limits.ts';
import { PART_LIMITS } from '#contract/parts.ts';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import type { FieldFault } from '#contract/problem.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { CONTROL, Field } from '../../ui/field.tsx';
import { MarkEntry } from '../../ui/mark-entry.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { PhotoPicker } from '../photos/photo-picker.tsx';
import type { Uploads } from '../photos/use-uploads.ts';
import { EntryChooser } from './entry-chooser.tsx';
import { FIELD_LABELS } from './part-draft.ts';
import type { PartDraft } from './part-draft.ts';
import { VisibilityChoice } from './visibility-choice.tsx';

type Props = {
  readonly draft: PartDraft;
  readonly change: (change: (now: PartDraft) => PartDraft) => void;
  readonly uploads: Uploads;
  readonly faults: readonly FieldFault[];
  /** A new part may say its casting number at once. */
  readonly isNew: boolean;
};

/** Ids of the controls, for a summary to point to. There is one such form on a page. */
export function partControlId(field: keyof typeof FIELD_LABELS): string {
  return `part-${field}`;
}

/** Everything that can be said of a part: photos first, the rest where it is known. */
export function PartFields({ draft, change, uploads, faults, isNew }: Props) {
  const faultOf = (field: keyof typeof FIELD_LABELS): string | null => faults.find(({ path }) => path[0] === field)?.message ?? null;
  const set = <Name extends keyof PartDraft>(name: Name, value: PartDraft[Name]): void => change((now) => ({ ...now, [name]: value }));
  const text = (name: 'called' | 'foundSerial', field: keyof typeof FIELD_LABELS = name) => ({
    id: partControlId(field),
    label: FIELD_LABELS[field],
    error: faultOf(field),
    value: draft[name],
    autoComplete: 'off',
    onChange: ({ target }: { readonly target: { readonly value: string } }) => set(name, target.value),
  });
  return (
    <PageGrid>
      <Block
        heading="Photos"
        margin={
          <Aside>
            <p>The whole part first, then each mark close up, the light low from one side.</p>
            <p>Marks are read from the photos afterwards; one good photo is enough to begin with.</p>
          </Aside>
        }
      >
        <PhotoPicker
          id={partControlId('photoIds')}
          uploads={uploads}
          ids={draft.photoIds}
          most={PHOTO_LIMITS.ofPart}
          onChange={(amend) => change((now) => ({ ...now, photoIds: [...amend(now.photoIds)] }))}
          error={faultOf('photoIds')}
        />
      </Block>
      <Block
        heading="What it is"
        margin={
          <Aside>
            <p>Leave open what you don’t know: the marks may tell.</p>
          </Aside>
        }
      >
        <div className="max-w-[680px]">
          <EntryChooser
            of="part-type"
            id={partControlId('partTypeId')}
            label={FIELD_LABELS.partTypeId}
            value={draft.partType}
            onChange={(chosen) => set('partType', chosen)}
            error={faultOf('partTypeId')}
            hint="What the catalogue calls it: gear case, flywheel"
            none="No part type of that name. Say it in your own words below."
          />
          <TextField {...text('called')} maxLength={PART_LIMITS.called} hint="Where the catalogue has no such type, or to tell it from others" />
          <EntryChooser
            of="maker"
            id={partControlId('makerId')}
            label={FIELD_LABELS.makerId}
            value={draft.maker}
            onChange={(chosen) => set('maker', chosen)}
            error={faultOf('makerId')}
            hint="Of the machine, or the foundry, where you know it"
            none="No maker of that name is on record. Leave it open."
          />
          {isNew && <NumberEntry value={draft.number} onChange={(number) => set('number', number)} told={faultOf('number')} />}
        </div>
      </Block>
      <Block heading="Where it was found">
        <div className="max-w-[680px]">
          <EntryChooser
            of="model"
            id={partControlId('foundModelId')}
            label={FIELD_LABELS.foundModelId}
            value={draft.foundModel}
            onChange={(chosen) => set('foundModel', chosen)}
            error={faultOf('foundModelId')}
            none="No model of that name is on record. Leave it open."
          />
          <TextField {...text('foundSerial')} maxLength={LIMITS.serial} mono autoCapitalize="characters" spellCheck={false} hint="The serial of that machine, as stamped. Others see it with its last digits masked." />
        </div>
      </Block>
      <Block heading="How it is">
        <div className="max-w-[680px]">
          <Words name="condition" value={draft.condition} onChange={(value) => set('condition', value)} error={faultOf('condition')} most={PART_LIMITS.condition} hint="Wear, cracks, repairs, what is missing. Say what you saw and measured." />
          <Words name="note" value={draft.note} onChange={(value) => set('note', value)} error={faultOf('note')} most={PART_LIMITS.note} hint="Where it lies, what was paid for it. Nobody else ever sees it." />
          <VisibilityChoice id={partControlId('visibility')} value={draft.visibility} onChange={(visibility) => set('visibility', visibility)} />
        </div>
      </Block>
    </PageGrid>
  );
}

function Aside({ children }: { readonly children: ReactNode }) {
  return <div className="space-y-3 text-[15px] leading-snug text-slag">{children}</div>;
}

type WordsProps = {
  readonly name: 'condition' | 'note';
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly error: string | null;
  readonly most: number;
  readonly hint: string;
};

function Words({ name, value, onChange, error, most, hint }: WordsProps) {
  return (
    <Field id={partControlId(name)} label={FIELD_LABELS[name]} error={error} hint={hint}>
      {(control) => <textarea {...control} rows={3} maxLength={most} value={value} onChange={({ target }) => onChange(target.value)} className={CONTROL} />}
    </Field>
  );
}

/** The casting number on the plate; what is wrong with it is said once the register, or the form, was asked. */
function NumberEntry({ value, onChange, told }: { readonly value: string; readonly onChange: (value: string) => void; readonly told: string | null }) {
  const isWhole = value === '' || parseReading(value).ok;
  return (
    <div id={partControlId('number')} tabIndex={-1} className="mt-2 mb-4">
      <MarkEntry label="Casting number, as you read it on the iron" value={value} onChange={onChange} fault={isWhole ? null : told} />
      <p className="mt-2 text-[15px] leading-snug text-slag">It becomes the part’s first mark. A date and other marks come after.</p>
    </div>
  );
}
