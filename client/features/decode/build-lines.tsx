import { Link } from 'react-router-dom';
import type { BuildAnswer } from '#contract/models.ts';
import { paths } from '../../lib/paths.ts';
import { saySpan } from '../../lib/say-date.ts';
import { NoteRef } from '../../ui/margin-notes.tsx';
import { sayStanding, saySubstitutions } from './build-words.ts';
import type { MachineNotes } from './machine-notes.tsx';
import { sayBuild } from './rule-of-decode.ts';

/** When the machine was built: the register's reading first, rival accounts after it, and what else the number could be. */
export function BuildLines({ build, notes }: { readonly build: BuildAnswer; readonly notes: MachineNotes }) {
  const built = sayBuild(build);
  const standing = sayStanding(build);
  const substitutions = saySubstitutions(build);
  const rivals = build.accounts.flatMap((account, place) => (place === 0 || account.window === null ? [] : [{ account, place }]));
  return (
    <div className="mt-8 border-t border-graphite pt-4">
      <p>
        <span className="font-mono">{build.serial.asStamped}</span>{' '}
        {built !== null && (
          <>
            was built <strong className="font-semibold">{built}</strong>
            <NoteRef numbers={notes.accountNumbers(0)} />.
          </>
        )}
        {standing !== null && <strong className="font-semibold">has no build window.</strong>}
      </p>
      {standing !== null && <p className="mt-1">{standing}</p>}
      {substitutions !== null && <p className="mt-1 text-slag">{substitutions} Check the plate.</p>}
      {rivals.map(({ account, place }) => (
        <p key={`${account.account.id} ${account.series.id}`} className="mt-1 text-slag">
          {account.account.title} says {sayBuild(account)}
          <NoteRef numbers={notes.accountNumbers(place)} />.
        </p>
      ))}
      {build.readsAlike.map(({ model, series, window }) => (
        <p key={`${model.slug} ${series.id}`} className="mt-1 text-slag">
          The same number stands on the <Link to={paths.model(model.slug)}>{model.name}</Link>, built {saySpan(window)}.
        </p>
      ))}
    </div>
  );
}
