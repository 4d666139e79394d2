import { CIPHER_LIMITS } from '#domain/ciphers/definition.ts';
import type { CipherDefinition, CipherException } from '#domain/ciphers/definition.ts';
import { foldCase } from '#domain/marks/glyphs.ts';
import { capital, sayPlace } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { CheckField } from '../../ui/check-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { FIELD_NAMES } from '../ciphers/cipher-words.ts';
import { namedFields, withException, withExceptionAdded, withExceptionSymbols, withoutException } from './edit-exceptions.ts';
import { FaultNote } from './fault-note.tsx';
import type { Places } from './places.ts';

type Props = { readonly definition: CipherDefinition; readonly places: Places; readonly onChange: (next: CipherDefinition) => void };

/** Marks that meant other days than the table says. */
export function ExceptionsEditor({ definition, places, onChange }: Props) {
  const exceptions = definition.exceptions ?? [];
  return (
    <section id={places.id('exceptions')} tabIndex={-1} aria-labelledby={places.id('exceptions', 'heading')} className="outline-none">
      <h3 id={places.id('exceptions', 'heading')} className="mb-1 text-[19px] font-semibold">
        Exceptions
      </h3>
      <p className="mb-3 max-w-measure text-slag">Marks that are known to mean other days than the symbols say: a batch that kept the old letter, say.</p>
      <FaultNote>{places.fault('exceptions')}</FaultNote>
      <ol className="space-y-4">
        {exceptions.map((exception, place) => (
          <Exception key={place} {...{ definition, places, onChange, exception, place }} />
        ))}
      </ol>
      {exceptions.length < CIPHER_LIMITS.exceptions && definition.fields.length > 0 && (
        <Button className={exceptions.length === 0 ? '' : 'mt-4'} onClick={() => onChange(withExceptionAdded(definition))}>
          Put in an exception
        </Button>
      )}
    </section>
  );
}

function Exception({ definition, places, onChange, exception, place }: Props & { readonly exception: CipherException; readonly place: number }) {
  const name = `${sayPlace(place)} exception`;
  return (
    <li id={places.id('exceptions', place)} tabIndex={-1} aria-label={capital(name)} className="border-t border-graphite pt-3 outline-none">
      <FaultNote>{places.fault('exceptions', place)}</FaultNote>
      <div className="grid gap-x-4 roomy:grid-cols-3">
        {namedFields(definition, exception).map((field) => (
          <TextField
            key={field}
            id={places.id('exceptions', place, 'fields', field)}
            label={`Where the ${FIELD_NAMES[field]} is`}
            mono
            value={exception.fields[field] ?? ''}
            maxLength={CIPHER_LIMITS.fieldWidth}
            autoCapitalize="characters"
            autoComplete="off"
            spellCheck={false}
            hint="Blank for any"
            error={places.fault('exceptions', place, 'fields', field)}
            onChange={({ target }) => onChange(withExceptionSymbols(definition, place, field, foldCase(target.value)))}
          />
        ))}
      </div>
      <div className="grid gap-x-4 roomy:grid-cols-2">
        <TextField
          id={places.id('exceptions', place, 'from')}
          type="date"
          label="it means the days from"
          value={exception.from}
          error={places.fault('exceptions', place, 'from')}
          onChange={({ target }) => onChange(withException(definition, place, { from: target.value }))}
        />
        <TextField
          id={places.id('exceptions', place, 'to')}
          type="date"
          label="to the day"
          value={exception.to}
          error={places.fault('exceptions', place, 'to')}
          onChange={({ target }) => onChange(withException(definition, place, { to: target.value }))}
        />
      </div>
      <CheckField
        label="What the symbols say by themselves holds too"
        checked={exception.replaces === false}
        onChange={({ target }) => onChange(withException(definition, place, { replaces: !target.checked }))}
      />
      <div>
        <Button className="mt-2" onClick={() => onChange(withoutException(definition, place))}>
          Take out<span className="sr-only"> the {name}</span>
        </Button>
      </div>
    </li>
  );
}
