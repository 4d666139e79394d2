import { useQuery } from '@tanstack/react-query';
import { Link, NavLink } from 'react-router-dom';
import { me } from '../features/people/people-queries.ts';
import { paths } from '../lib/paths.ts';
import { Logo } from '../ui/logo.tsx';
import { ViewerMenu } from './viewer-menu.tsx';

const CATALOGUE_AREAS = ['/catalogue', '/makers', '/models', '/part-types', '/castings', '/ciphers', '/serial-ranges', '/sources', '/marks', '/contributors'] as const;
const BENCH_AREAS = ['/bench', '/parts'] as const;
/** A mark is read at the bench, whosever it is. */
const READING = /^\/marks\/[^/]+\/read$/;
const CONTRIBUTE_AREAS = ['/contribute', '/contributions'] as const;
const QUEUE_AREAS = ['/moderation'] as const;
const REGISTRAR_AREAS = ['/registrar'] as const;

export function SiteHeader({ pathname }: { readonly pathname: string }) {
  const { data: viewer } = useQuery(me());
  return (
    <header className="flex flex-wrap items-center gap-x-4 gap-y-1 pt-4 wide:gap-x-8">
      <Link to={paths.decode()} className="inline-flex min-h-11 items-center gap-2.5 text-[22px] leading-none roomy:text-[24px] font-semibold text-graphite no-underline">
        <Logo /> Pourbook
      </Link>
      <nav aria-label="Pourbook" className="no-print max-wide:order-last max-wide:w-full">
        <ul className="flex flex-wrap gap-x-1 text-[15px] max-wide:-ml-1 min-[390px]:gap-x-2 min-[390px]:text-base roomy:gap-x-5">
          <li>
            <NavLink to={paths.decode()} className="nav-link">
              Decode
            </NavLink>
          </li>
          <Area to={paths.catalogue()} isCurrent={isIn(CATALOGUE_AREAS, pathname) && !READING.test(pathname)} name="Catalogue" />
          <Area to={paths.bench()} isCurrent={isIn(BENCH_AREAS, pathname) || READING.test(pathname)} name="Bench" />
          <Area to={paths.contribute()} isCurrent={isIn(CONTRIBUTE_AREAS, pathname)} name="Contribute" />
          {viewer?.can.decideContributions && <Area to={paths.queue()} isCurrent={isIn(QUEUE_AREAS, pathname)} name="Queue" />}
          {viewer?.can.seeMembers && <Area to={paths.registrarMembers()} isCurrent={isIn(REGISTRAR_AREAS, pathname)} name="Registrar" />}
        </ul>
      </nav>
      <ViewerMenu />
    </header>
  );
}

function Area({ to, isCurrent, name }: { readonly to: string; readonly isCurrent: boolean; readonly name: string }) {
  return (
    <li>
      <Link to={to} className="nav-link" {...(isCurrent ? { 'aria-current': 'page' } : {})}>
        {name}
      </Link>
    </li>
  );
}

function isIn(areas: readonly string[], pathname: string): boolean {
  return areas.some((area) => pathname === area || pathname.startsWith(`${area}/`));
}
