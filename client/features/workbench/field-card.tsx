import { CIPHER_LIMITS, FIELD_KINDS, WEEK_RULES } from '#domain/ciphers/definition.ts';
import type { CipherDefinition, FieldDefinition, WeekRule } from '#domain/ciphers/definition.ts';
import { capital, sayPlace } from '../../lib/say-number.ts';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { FieldPlaces } from '../ciphers/cipher-layout.tsx';
import { FIELD_NAMES, widthOf } from '../ciphers/cipher-words.ts';
import { withField, withKind, withNewSet, widthStepped } from './edit-layout.ts';
import type { SymbolSetKind } from './edit-layout.ts';
import { FaultNote } from './fault-note.tsx';
import type { Places } from './places.ts';
import { Stepper } from './stepper.tsx';

type Props = {
  readonly definition: CipherDefinition;
  readonly place: number;
  readonly field: FieldDefinition;
  readonly places: Places;
  readonly onChange: (next: CipherDefinition) => void;
  readonly onMove: (by: -1 | 1) => void;
  readonly onTakeOut: () => void;
};

/** One field of the layout: what it says, what it is written in, how wide it is, where it stands. */
export function FieldCard({ definition, place, field, places, onChange, onMove, onTakeOut }: Props) {
  const change = (next: FieldDefinition) => onChange(withField(definition, place, next));
  const name = `${sayPlace(place)} field`;
  return (
    <li id={places.id('fields', place)} tabIndex={-1} className="border-t border-graphite pt-3 outline-none">
      <div className="mb-3 min-h-12 overflow-x-auto">
        <FieldPlaces field={field} />
      </div>
      <FaultNote>{places.fault('fields', place)}</FaultNote>
      <SelectField
        id={places.id('fields', place, 'kind')}
        label={capital(name)}
        value={field.field}
        onChange={({ target }) => onChange(withKind(definition, place, FIELD_KINDS.find((kind) => kind === target.value) ?? field.field))}
      >
        {FIELD_KINDS.map((kind) => (
          <option key={kind} value={kind}>
            {capital(FIELD_NAMES[kind])}
          </option>
        ))}
      </SelectField>
      {field.field === 'literal' ? (
        <TextField
          id={places.id('fields', place, 'text')}
          label="Always cast"
          mono
          value={field.text}
          maxLength={CIPHER_LIMITS.literalLength}
          autoComplete="off"
          spellCheck={false}
          hint="A hyphen, point or space is a gap"
          error={places.fault('fields', place, 'text')}
          onChange={({ target }) => change({ field: 'literal', text: target.value.toUpperCase() })}
        />
      ) : (
        <>
          {field.field === 'other' && (
            <TextField
              id={places.id('fields', place, 'name')}
              label="What it is called"
              value={field.name ?? ''}
              maxLength={40}
              autoComplete="off"
              hint="Shift, moulder, pattern letter"
              error={places.fault('fields', place, 'name')}
              onChange={({ target }) => change(named(field, target.value))}
            />
          )}
          <ScriptChoice {...{ definition, place, field, places, onChange }} />
          {field.field === 'week' && (
            <SelectField
              id={places.id('fields', place, 'week')}
              label="Weeks run"
              value={field.week ?? 'iso'}
              error={places.fault('fields', place, 'week')}
              onChange={({ target }) => change({ ...field, week: WEEK_RULES.find((rule) => rule === target.value) ?? 'iso' })}
            >
              {WEEK_RULES.map((rule) => (
                <option key={rule} value={rule}>
                  {WEEKS[rule]}
                </option>
              ))}
            </SelectField>
          )}
          <Width {...{ definition, place, field, places, onChange }} />
        </>
      )}
      <div className="mt-2 flex flex-wrap gap-2">
        <MoveButton id={places.id('fields', place, 'earlier')} said="Earlier" of={name} off={place === 0} onPress={() => onMove(-1)} />
        <MoveButton
          id={places.id('fields', place, 'later')}
          said="Later"
          of={name}
          off={place === definition.fields.length - 1}
          onPress={() => onMove(1)}
        />
        <MoveButton id={places.id('fields', place, 'out')} said="Take out" of={name} off={false} onPress={onTakeOut} />
      </div>
    </li>
  );
}

/** Each rule in the words it is chosen by. */
const WEEKS: Readonly<Record<WeekRule, string>> = {
  iso: 'Monday to Sunday (ISO 8601)',
  simple: 'by sevens from 1 January',
  'first-full-sunday': 'from the first full Sunday week',
};

type PartProps = Pick<Props, 'definition' | 'place' | 'places' | 'onChange'> & {
  readonly field: Exclude<FieldDefinition, { readonly field: 'literal' }>;
};

/** Figures, a set there is, or a new one. */
function ScriptChoice({ definition, place, field, places, onChange }: PartProps) {
  const names = Object.keys(definition.symbolSets);
  const isKnown = field.symbols === 'numerals' || names.includes(field.symbols);
  const choose = (value: string) => {
    const fresh = NEW_SETS.find(({ choice }) => choice === value);
    onChange(fresh === undefined ? withField(definition, place, { ...field, symbols: value.slice(OLD.length) }) : withNewSet(definition, place, fresh.kind));
  };
  return (
    <SelectField
      id={places.id('fields', place, 'symbols')}
      label="Written in"
      value={`${OLD}${field.symbols}`}
      error={places.fault('fields', place, 'symbols')}
      onChange={({ target }) => choose(target.value)}
    >
      <option value={`${OLD}numerals`}>figures 0 to 9</option>
      {!isKnown && <option value={`${OLD}${field.symbols}`}>“{field.symbols}”, which is not there</option>}
      {names.map((name) => (
        <option key={name} value={`${OLD}${name}`}>
          “{name}”
        </option>
      ))}
      {NEW_SETS.map(({ choice, said }) => (
        <option key={choice} value={choice}>
          {said}
        </option>
      ))}
    </SelectField>
  );
}

const OLD = 'set ';
const NEW_SETS: readonly { readonly choice: string; readonly kind: SymbolSetKind; readonly said: string }[] = [
  { choice: 'new digits', kind: 'digits', said: 'a new key: a letter for each figure' },
  { choice: 'new values', kind: 'values', said: 'new letters: one for each number' },
];

function Width({ definition, place, field, places, onChange }: PartProps) {
  const { least, most } = widthOf(field);
  const step = (end: 'least' | 'most') => (by: -1 | 1) => onChange(withField(definition, place, { ...field, width: widthStepped(field.width, end, by) }));
  const bounds = { least: 1, most: CIPHER_LIMITS.fieldWidth };
  return (
    <div id={places.id('fields', place, 'width')} tabIndex={-1} role="group" aria-label={`Glyphs in the ${sayPlace(place)} field`} className="outline-none">
      <p className="mb-1 text-slag">Glyphs</p>
      <div className="flex flex-wrap gap-x-4 gap-y-2">
        <Stepper label="At least" value={least} {...bounds} onStep={step('least')} />
        <Stepper label="At most" value={most} {...bounds} onStep={step('most')} />
      </div>
      <div className="mt-1 min-h-6">
        <FaultNote>{places.fault('fields', place, 'width')}</FaultNote>
      </div>
    </div>
  );
}

type MoveProps = { readonly id: string; readonly said: string; readonly of: string; readonly off: boolean; readonly onPress: () => void };

function MoveButton({ id, said, of, off, onPress }: MoveProps) {
  return (
    <button
      id={id}
      type="button"
      aria-label={`${said}: ${of}`}
      aria-disabled={off}
      onClick={() => !off && onPress()}
      className="min-h-11 cursor-pointer rounded border border-edge bg-paper px-3 text-[15px] hover:border-graphite aria-disabled:cursor-not-allowed aria-disabled:text-edge"
    >
      {said}
    </button>
  );
}

function named(field: Extract<FieldDefinition, { readonly field: 'other' }>, name: string): FieldDefinition {
  const { symbols, width } = field;
  return name === '' ? { field: 'other', symbols, width } : { field: 'other', symbols, width, name };
}

