import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, NavLink, useLocation, useNavigate } from 'react-router-dom';
import { signOut } from '#contract/accounts.ts';
import type { Me } from '#contract/people.ts';
import { leaveViewer, useOtherTabs } from '../features/people/change-viewer.ts';
import { me } from '../features/people/people-queries.ts';
import { call } from '../lib/call.ts';
import { paths } from '../lib/paths.ts';
import { sayFailure } from '../lib/say-failure.ts';

/** The end of the header: the way in, or who is in, their notices and the way out. */
export function ViewerMenu() {
  useOtherTabs();
  const { data: viewer } = useQuery(me());
  return (
    <nav aria-label="You" className="no-print flex min-h-11 min-w-0 flex-1 basis-0 justify-end">
      {viewer === null && <WayIn />}
      {viewer && <Signed viewer={viewer} />}
    </nav>
  );
}

function WayIn() {
  const { pathname, search } = useLocation();
  const isDoor = pathname === '/sign-in' || pathname === '/sign-up';
  return (
    <Link to={paths.signIn(isDoor ? undefined : `${pathname}${search}`)} className="nav-link" {...(pathname === '/sign-in' ? { 'aria-current': 'page' } : {})}>
      Sign in
    </Link>
  );
}

function Signed({ viewer }: { readonly viewer: Me }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const leave = useMutation({
    mutationFn: () => call(signOut, {}),
    onSuccess: () => {
      void navigate(paths.signIn());
      leaveViewer(queryClient);
    },
  });
  return (
    <ul className="flex min-w-0 items-center gap-x-2 roomy:gap-x-5">
      <li>
        <NavLink to={paths.notices()} className="nav-link gap-2">
          <Bell />
          <span className="sr-only">Notices</span>
          {viewer.unreadNotices > 0 && (
            <span className="min-w-6 rounded bg-temper px-1.5 text-center text-[15px] leading-6 font-semibold text-sand tabular-nums">
              {viewer.unreadNotices > 99 ? '99+' : viewer.unreadNotices}
              <span className="sr-only"> not read</span>
            </span>
          )}
        </NavLink>
      </li>
      <li className="min-w-0">
        <NavLink to={paths.account()} end className="nav-link max-w-full min-w-0">
          <span className="sr-only">Your account: </span>
          <span aria-hidden="true" className="roomy:hidden">
            You
          </span>
          <span className="max-w-[15ch] truncate max-roomy:sr-only">{viewer.displayName}</span>
        </NavLink>
      </li>
      <li>
        <button type="button" className="nav-link cursor-pointer whitespace-nowrap" disabled={leave.isPending} onClick={() => leave.mutate()}>
          Sign out
        </button>
        {leave.isError && (
          <p role="alert" className="text-[15px] text-scale">
            {sayFailure(leave.error).title}. You are still signed in.
          </p>
        )}
      </li>
    </ul>
  );
}

function Bell() {
  return (
    <svg viewBox="0 0 20 20" width="22" height="22" aria-hidden="true" focusable="false">
      <path d="M10 2.5v1.6M4 14.5c1.4-1.3 1.6-2.8 1.6-5.2C5.6 6 7.5 4.1 10 4.1s4.4 1.9 4.4 5.2c0 2.400.2 3.900 1.600 5.200zM8.3 16.8c.8 1 2.600 1 3.400 0" fill="none" stroke="currentColor" strokeWidth="1.7" strokeLinejoin="round" strokeLinecap="round" />
    </svg>
  );
}
