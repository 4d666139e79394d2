import { Link, NavLink } from 'react-router-dom';
import { paths } from '../lib/paths.ts';
import { Logo } from '../ui/logo.tsx';
import { ViewerMenu } from './viewer-menu.tsx';

const CATALOGUE_AREAS = ['/catalogue', '/makers', '/models', '/part-types', '/castings', '/ciphers', '/serial-ranges', '/sources'] as const;

export function SiteHeader({ pathname }: { readonly pathname: string }) {
  const inCatalogue = CATALOGUE_AREAS.some((area) => pathname === area || pathname.startsWith(`${area}/`));
  return (
    <header className="group flex flex-wrap items-center gap-x-4 gap-y-1 pt-4 roomy:gap-x-8">
      <Link to={paths.decode()} className="inline-flex min-h-11 items-center gap-2.5 text-[22px] leading-none roomy:text-[24px] font-semibold text-graphite no-underline">
        <Logo /> Pourbook
      </Link>
      <nav
        aria-label="Pourbook"
        className="no-print max-roomy:group-has-data-way-in:order-last max-roomy:group-has-data-way-in:w-full"
      >
        <ul className="flex gap-2 roomy:gap-5">
          <li>
            <NavLink to={paths.decode()} className="nav-link">
              Decode
            </NavLink>
          </li>
          <li>
            <Link to={paths.catalogue()} className="nav-link" {...(inCatalogue ? { 'aria-current': 'page' } : {})}>
              Catalogue
            </Link>
          </li>
        </ul>
      </nav>
      <ViewerMenu />
    </header>
  );
}
