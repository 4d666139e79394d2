import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { MONTHS } from '#domain/dates/format-day.ts';
import { CheckField } from '../../ui/check-field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import type { Places } from './places.ts';

type Props = { readonly definition: CipherDefinition; readonly places: Places; readonly onChange: (next: CipherDefinition) => void };

const NEW_YEARS_DAY = '01-01';
const DAYS = Array.from({ length: 31 }, (_, place) => String(place + 1).padStart(2, '0'));

/** When the cipher was in use, and when its years began. */
export function YearsEditor({ definition, places, onChange }: Props) {
  const { usedFrom, usedTo } = definition;
  return (
    <section aria-labelledby={places.id('years', 'heading')}>
      <h3 id={places.id('years', 'heading')} className="mb-3 text-[19px] font-semibold">
        In use
      </h3>
      <div className="grid gap-x-5 roomy:grid-cols-2">
        <TextField
          id={places.id('usedFrom')}
          type="date"
          label="First day"
          value={usedFrom}
          error={places.fault('usedFrom')}
          onChange={({ target }) => onChange({ ...definition, usedFrom: target.value })}
        />
        <div>
          <TextField
            id={places.id('usedTo')}
            type="date"
            label="Last day"
            value={usedTo ?? ''}
            disabled={usedTo === null}
            error={places.fault('usedTo')}
            onChange={({ target }) => onChange({ ...definition, usedTo: target.value })}
          />
          <CheckField
            label="Still in use"
            checked={usedTo === null}
            onChange={({ target }) => onChange({ ...definition, usedTo: target.checked ? null : '' })}
          />
        </div>
      </div>
      <YearStart {...{ definition, places, onChange }} />
    </section>
  );
}

function YearStart({ definition, places, onChange }: Props) {
  const { yearStart, ...others } = definition;
  const [month = '01', day = '01'] = (yearStart ?? NEW_YEARS_DAY).split('-');
  const fault = places.fault('yearStart');
  return (
    <>
      <CheckField
        label="The maker’s year began on another day than 1 January"
        checked={yearStart !== undefined}
        onChange={({ target }) => onChange(target.checked ? { ...others, yearStart: NEW_YEARS_DAY } : others)}
      />
      {yearStart !== undefined && (
        <div id={places.id('yearStart')} tabIndex={-1} role="group" aria-label="The year began on" className="grid max-w-[420px] grid-cols-[112px_minmax(0,1fr)] gap-x-4 outline-none">
          <SelectField label="Day" value={day} error={fault} onChange={({ target }) => onChange({ ...others, yearStart: `${month}-${target.value}` })}>
            {DAYS.map((one) => (
              <option key={one} value={one}>
                {Number(one)}
              </option>
            ))}
          </SelectField>
          <SelectField label="Month" value={month} onChange={({ target }) => onChange({ ...others, yearStart: `${target.value}-${day}` })}>
            {MONTHS.map((name, place) => (
              <option key={name} value={String(place + 1).padStart(2, '0')}>
                {name}
              </option>
            ))}
          </SelectField>
        </div>
      )}
    </>
  );
}
