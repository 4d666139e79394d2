import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { KINDS } from '#contract/kinds.ts';
import type { KindForm } from '#contract/kinds/kind.ts';
import { me } from '../../features/people/people-queries.ts';
import { paths } from '../../lib/paths.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';

/** What somebody who has just found a part in the yard can tell; the rest is for whoever builds the catalogue further. */
const FIRST_STEPS = [KINDS.casting, KINDS.cipher, KINDS['serial-range']] as const;
const OTHERS = Object.values(KINDS).filter((form: KindForm) => !FIRST_STEPS.some(({ kind }) => kind === form.kind));

export function Component() {
  const { data: viewer } = useQuery(me());
  return (
    <>
      <PageTitle title="Contribute" below="What the register knows, people put there, each with a source.">
        Contribute
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="Begin here"
            margin={
              <div className="space-y-3 text-[15px] leading-snug text-slag">
                <p>You draft, look it over and put it forward. A moderator of that maker enters it, sends it back with a question, or turns it down, always with a reason.</p>
                <p>An entry that is wrong? Open its page and choose “Put a change forward”, or flag it.</p>
                {viewer && (
                  <p>
                    <Link to={paths.myContributions()} className="inline-flex min-h-11 items-center">
                      Your contributions
                    </Link>
                  </p>
                )}
              </div>
            }
          >
            {viewer === null && <SignInFirst />}
            <ul className="border-t border-graphite">
              {FIRST_STEPS.map((form, place) => (
                <li key={form.kind} className="flex flex-wrap items-center justify-between gap-x-8 gap-y-2 border-b border-rule py-4">
                  <div className="min-w-0 flex-1 basis-[280px]">
                    <p className="font-semibold">{form.name}</p>
                    <p className="text-slag">{form.about}</p>
                  </div>
                  <ButtonLink to={paths.contributeKind(form.kind)} weight={place === 0 && viewer !== null ? 'primary' : 'plain'}>
                    Put a {form.name.toLowerCase()} forward
                  </ButtonLink>
                </li>
              ))}
            </ul>
          </Block>
          <Block heading="Everything else">
            <dl>
              {OTHERS.map(({ kind, name, about }) => (
                <div key={kind} className="grid gap-x-4 border-b border-rule py-1 roomy:grid-cols-[184px_minmax(0,1fr)]">
                  <dt>
                    <Link to={paths.contributeKind(kind)} className="inline-flex min-h-11 items-center">
                      {name}
                    </Link>
                  </dt>
                  <dd className="pb-2 text-slag roomy:flex roomy:min-h-11 roomy:items-center roomy:pb-0">{about}</dd>
                </div>
              ))}
            </dl>
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

function SignInFirst() {
  return (
    <div className="mb-6 max-w-measure border-y border-rule py-4">
      <p>Whoever contributes has an account, so that every entry has a name beside it.</p>
      <div className="mt-3 flex flex-wrap gap-3">
        <ButtonLink weight="primary" to={paths.signIn(paths.contribute())}>
          Sign in
        </ButtonLink>
        <ButtonLink to={paths.signUp()}>Open an account</ButtonLink>
      </div>
    </div>
  );
}
