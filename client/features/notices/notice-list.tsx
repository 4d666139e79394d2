import { Link } from 'react-router-dom';
import type { Notice } from '#contract/notices.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { Button } from '../../ui/button.tsx';

type Props = {
  readonly notices: readonly Notice[];
  readonly busy: boolean;
  /** A notice was followed, or marked. */
  readonly onRead: (id: string) => void;
};

/** Notices, newest first. One not read yet says so in a word, beside its rule. */
export function NoticeList({ notices, busy, onRead }: Props) {
  return (
    <ol aria-label="Notices" className="border-t border-graphite">
      {notices.map((notice) => (
        <li key={notice.id} className={`flex flex-wrap items-start justify-between gap-x-6 gap-y-2 border-b border-rule py-4 ${notice.read ? '' : 'border-l-4 border-l-temper pl-4'}`}>
          <div className="min-w-0 max-w-measure flex-1 basis-[260px]">
            <p className={notice.read ? '' : 'font-semibold'}>
              {notice.href === null ? (
                notice.title
              ) : (
                <Link
                  to={notice.href}
                  onClick={() => {
                    if (!notice.read) onRead(notice.id);
                  }}
                >
                  {notice.title}
                </Link>
              )}
            </p>
            {notice.body !== '' && <p>{notice.body}</p>}
            <p className="text-[15px] text-slag">
              {!notice.read && <span className="font-semibold text-temper">New · </span>}
              <time dateTime={notice.at}>{sayInstant(notice.at)}</time>
            </p>
          </div>
          {!notice.read && (
            <Button disabled={busy} onClick={() => onRead(notice.id)}>
              Mark read<span className="sr-only"> {notice.title}</span>
            </Button>
          )}
        </li>
      ))}
    </ol>
  );
}
