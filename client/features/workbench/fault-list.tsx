import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { capital, sayCount } from '../../lib/say-number.ts';
import { Icon } from '../../ui/icon.tsx';
import type { PlacedFault } from './places.ts';
import { sayWhere } from './say-where.ts';

type Props = { readonly faults: readonly PlacedFault[]; readonly definition: CipherDefinition; readonly blank: boolean };

/** How many faults the draft has, read out when the number changes, and each with the way to it. */
export function FaultList({ faults, definition, blank }: Props) {
  const said = blank && faults.length === 0 ? 'Nothing is laid out yet.' : sayFaults(faults.length);
  const isSound = faults.length === 0 && !blank;
  return (
    <div className={`border-l-4 bg-bed px-4 py-3 ${isSound ? 'border-verdigris' : faults.length > 0 ? 'border-straw' : 'border-edge'}`}>
      <p role="status" className={`flex items-center gap-2 font-semibold ${isSound ? 'text-verdigris' : faults.length > 0 ? 'text-straw' : ''}`}>
        {!blank && <Icon name={isSound ? 'check' : 'warning'} />}
        {said}
      </p>
      {faults.length > 0 && (
        <>
          <ul className="mt-1">
            {faults.map(({ path, message, controlId }) => (
              <li key={`${path.join('.')} ${message}`} className="text-[15px] leading-snug">
                <a href={`#${controlId}`} className="inline-block py-1.5">
                  {sayWhere({ path, message }, definition)}: {message}
                </a>
              </li>
            ))}
          </ul>
          <p className="mt-1 text-[15px] text-slag">The draft is kept as it is; it can be put forward once nothing is left here.</p>
        </>
      )}
    </div>
  );
}

function sayFaults(count: number): string {
  if (count === 0) return 'No fault: the draft makes sense.';
  return `${capital(sayCount(count))} ${count === 1 ? 'fault' : 'faults'} to mend`;
}
