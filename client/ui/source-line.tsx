import { Link } from 'react-router-dom';
import type { FactSource } from '#contract/common.ts';
import { paths } from '../lib/paths.ts';
import { capital } from '../lib/say-number.ts';

/** A source as the margin names it: its title (or `words` of your own), where in it, and a remark. */
export function SourceLine({ source, words }: { readonly source: FactSource | null; readonly words?: string }) {
  if (source === null) return <>No source on record.</>;
  return (
    <>
      <Link to={paths.source(source.source.slug)}>{words === undefined ? source.source.title : capital(words)}</Link>
      {words === undefined && source.locator !== null && `, ${source.locator}`}.{source.note !== null && ` ${source.note}`}
    </>
  );
}
