import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { DecodeResult } from '#contract/decode.ts';
import type { CipherPage } from '#contract/ciphers.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment, sayYears } from '../../lib/say-date.ts';
import type { Note } from '../../ui/margin-notes.tsx';
import { SourceLine } from '../../ui/source-line.tsx';
import { cipherInHand } from './decode-queries.ts';
import { fieldWord } from './divisions.ts';

/** The margin beside the dates: which cipher they were read under, and who says so. */
export function useCipherNotes(result: DecodeResult | null): readonly Note[] {
  const named = result?.cipher ?? null;
  const page = useQuery(cipherInHand(named?.slug ?? null));
  if (result === null || named === null) return [];
  const cipher = page.data ?? null;
  return [
    {
      number: 1,
      heading: 'Cipher.',
      body: (
        <>
          <Link to={paths.cipher(named.slug)}>{named.title}</Link>
          {cipher !== null && `, ${sayFields(cipher)}`}, in use {sayYears(result.used)}. Version {named.version}.
        </>
      ),
      ...(cipher === null ? {} : { fine: <Entered cipher={cipher} /> }),
    },
  ];
}

function Entered({ cipher: { provenance } }: { readonly cipher: CipherPage }) {
  return (
    <>
      {provenance.sources.map((source) => (
        <span key={`${source.source.slug} ${source.locator ?? ''} ${source.field ?? ''}`} className="block">
          <SourceLine source={source} />
        </span>
      ))}
      Entered by {provenance.enteredBy}, {sayMoment(provenance.enteredAt)}.
    </>
  );
}

function sayFields({ definition }: CipherPage): string {
  return definition.fields.flatMap(({ field }) => (field === 'literal' ? [] : [fieldWord(field)])).join(' · ');
}
