import { useEffect, useRef } from 'react';
import type { ReactNode } from 'react';
import { Link, Outlet, ScrollRestoration, useLocation, useNavigation } from 'react-router-dom';
import { paths } from '../lib/paths.ts';
import { Live } from '../ui/live.tsx';
import { SiteHeader } from './site-header.tsx';

/** The frame every page stands in. */
export function Layout() {
  return (
    <Frame>
      <Outlet />
      <ScrollRestoration />
    </Frame>
  );
}

/** The frame with anything in it: the error pages use it too. */
export function Frame({ children }: { readonly children: ReactNode }) {
  const { pathname } = useLocation();
  const navigation = useNavigation();
  const leaving = navigation.location !== undefined && navigation.location.pathname !== pathname;
  useHeadingFocus(pathname);
  return (
    <div className="mx-auto flex min-h-dvh max-w-page flex-col px-[18px] roomy:px-8 wide:px-12 min-[1200px]:px-0">
      <a
        href="#main"
        className="sr-only focus:not-sr-only focus:absolute focus:top-2 focus:left-2 focus:z-10 focus:rounded focus:bg-graphite focus:px-4 focus:py-3 focus:text-sand"
      >
        Skip to the page
      </a>
      <SiteHeader pathname={pathname} />
      <Live>{leaving ? 'Loading the page' : ''}</Live>
      <main id="main" tabIndex={-1} className={`grow pb-16 outline-none ${leaving ? 'is-stale-block' : ''}`} aria-busy={leaving}>
        {children}
      </main>
      <footer className="border-t border-rule py-6 text-[15px] leading-snug text-slag">
        <p className="max-w-measure">
          A date is no sign of soundness, and a fit is no title check or appraisal. Lifting, pressure, lead, asbestos and cracked iron belong to
          competent people under local rules.
        </p>
        <p className="no-print mt-3">
          <Link className="inline-flex min-h-11 items-center" to={paths.developers()}>
            The interface for programs
          </Link>
        </p>
      </footer>
    </div>
  );
}

/** After a link to another page the heading takes focus, so that a screen reader starts at the top of it. */
function useHeadingFocus(pathname: string) {
  const last = useRef(pathname);
  useEffect(() => {
    if (last.current === pathname) return;
    last.current = pathname;
    document.querySelector<HTMLElement>('[data-page-heading]')?.focus({ preventScroll: true });
  }, [pathname]);
}
