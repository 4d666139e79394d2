import { NavLink } from 'react-router-dom';
import { paths } from '../../lib/paths.ts';

/** The moderators' pages beside each other. */
export function ModerationLinks() {
  return (
    <span className="flex gap-5">
      <NavLink to={paths.queue()} end className="nav-link">
        Queue
      </NavLink>
      <NavLink to={paths.reworks()} className="nav-link">
        Worked out again
      </NavLink>
    </span>
  );
}
