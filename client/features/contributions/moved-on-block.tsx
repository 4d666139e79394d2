import type { ContributionPage } from '#contract/contributions.ts';
import { Block } from '../../ui/page-grid.tsx';
import { SideBySide } from './side-by-side.tsx';

/** For whoever reads a contribution: the entry has another version in force than the one it was begun on. */
export function MovedOnBlock({ contribution: { kind, base, inForce, payload, names, author, can } }: { readonly contribution: ContributionPage }) {
  if (base === null) return null;
  const sides = [
    { header: `version ${base.version}, begun on`, payload: base.payload },
    ...(inForce === null ? [] : [{ header: `version ${inForce.version}, in force`, payload: inForce.payload }]),
    { header: 'this contribution', payload },
  ];
  return (
    <Block heading={inForce === null ? 'The entry was retired meanwhile' : `Version ${inForce.version} was entered meanwhile`}>
      <p className="mb-3 max-w-measure">
        {can.edit ? 'You carry yours over to it in the draft.' : `It can’t be entered as it is: ${author.displayName} carries it over to the version in force and puts it forward again.`}
      </p>
      <SideBySide kind={kind} caption="The versions and this contribution" sides={sides} names={names} />
    </Block>
  );
}
