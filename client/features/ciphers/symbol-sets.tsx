import type { CipherDefinition, FieldDefinition } from '#domain/ciphers/definition.ts';
import { sayList } from '../../lib/say-number.ts';
import { keyOf, sayField, symbolLines } from './cipher-words.ts';
import type { SymbolLine } from './cipher-words.ts';

type Props = { readonly definition: CipherDefinition; readonly asOf: string };
type SymbolField = Exclude<FieldDefinition, { readonly field: 'literal' }>;

/** Every symbol set in use as a table: a key word spread over its figures, letters with the months or years they stand for. */
export function SymbolSets({ definition, asOf }: Props) {
  const used = { from: definition.usedFrom, to: definition.usedTo };
  const fields = definition.fields.filter((field): field is SymbolField => field.field !== 'literal');
  const inFigures = fields.filter(({ symbols }) => symbols === 'numerals');
  return (
    <div className="space-y-7">
      {Object.entries(definition.symbolSets).map(([name, set]) => {
        const served = fields.filter(({ symbols }) => symbols === name);
        const [first] = served;
        const heading = `“${name}”${served.length === 0 ? '' : `, for ${sayList(served.map(sayField), 'and')}`}`;
        const key = keyOf(set);
        return (
          <section key={name} aria-label={heading}>
            <h3 className="mb-2 font-semibold">{heading}</h3>
            {key !== null && (
              <p className="mb-2 text-slag">
                1 to 9 and 0 in the order of <span className="font-mono text-graphite">{key}</span>
              </p>
            )}
            {set.kind === 'digits' && key !== null ? (
              <KeyTable name={name} lines={symbolLines(set, first?.field ?? 'other', used, asOf)} />
            ) : (
              <SymbolList lines={symbolLines(set, first?.field ?? 'other', used, asOf)} />
            )}
          </section>
        );
      })}
      {inFigures.length > 0 && <p>In figures, 0 to 9 as they are: {sayList(inFigures.map(sayField), 'and')}.</p>}
    </div>
  );
}

/** Symbols over the figures they stand for. */
function KeyTable({ name, lines }: { readonly name: string; readonly lines: readonly SymbolLine[] }) {
  const figures = lines.filter(({ means }) => means.length === 1);
  const others = lines.filter(({ means }) => means.length > 1);
  return (
    <>
      <table className="border-collapse text-center">
        <caption className="sr-only">Symbols of {name} and the figures they stand for</caption>
        <thead>
          <tr>
            {figures.map(({ symbol }) => (
              <th
                key={symbol}
                scope="col"
                className="w-8 border border-rule bg-paper py-1 font-mono text-[19px] font-bold roomy:w-11"
              >
                {symbol}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          <tr>
            {figures.map(({ symbol, means }) => (
              <td key={symbol} className="border border-rule py-1 font-mono">
                {means}
              </td>
            ))}
          </tr>
        </tbody>
      </table>
      {others.map(({ symbol, means }) => (
        <p key={symbol} className="mt-2">
          <span className="font-mono font-bold">{symbol}</span> stands for {means}.
        </p>
      ))}
    </>
  );
}

function SymbolList({ lines }: { readonly lines: readonly SymbolLine[] }) {
  const isLong = lines.some(({ means }) => means.length > 12);
  return (
    <dl
      className={`grid gap-x-6 ${isLong ? 'roomy:grid-cols-2 wide:grid-cols-3' : 'grid-cols-2 roomy:grid-cols-3 wide:grid-cols-4'}`}
    >
      {lines.map(({ symbol, means }) => (
        <div key={symbol} className="flex items-baseline gap-3 border-b border-rule py-1.5">
          <dt className="min-w-6 font-mono font-bold">{symbol}</dt>
          <dd className="tabular-nums">{means}</dd>
        </div>
      ))}
    </dl>
  );
}
