import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { takeBackReading } from '#contract/marks.ts';
import type { MarkPage, ReadingShown } from '#contract/marks.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { partKeys } from '../parts/parts-queries.ts';
import { ActTrouble } from '../people/act-trouble.tsx';
import { MarkText } from './mark-text.tsx';
import { markKeys, markPage } from './marks-queries.ts';

/** Every reading there was, newest first; those that no longer count say why. A reading of one's own can be taken back. */
export function ReadingsTable({ mark: { id, readings, can } }: { readonly mark: Pick<MarkPage, 'id' | 'readings' | 'can'> }) {
  const queryClient = useQueryClient();
  const [takenBack, setTakenBack] = useState(false);
  const takeBack = useMutation({
    mutationFn: (readingId: string) => call(takeBackReading, { params: { id: readingId } }),
    onSuccess: (answer) => {
      setTakenBack(true);
      queryClient.setQueryData(markPage(id).queryKey, answer);
      void queryClient.invalidateQueries({ queryKey: partKeys.all });
      void queryClient.invalidateQueries({ queryKey: markKeys.lists });
    },
  });
  const canTakeBack = readings.some((reading) => reading.isMine && stands(reading));
  return (
    <>
      <DataTable
        caption="Readings"
        rows={readings}
        rowKey={({ id: readingId }) => readingId}
        empty={<p className="border-y border-rule py-4 text-slag">Nobody has read it yet.</p>}
        columns={[
          {
            key: 'text',
            header: 'Read as',
            rowHeader: true,
            cell: (reading) => (
              <span className={stands(reading) ? '' : 'opacity-60'}>
                <MarkText text={reading.text} />
              </span>
            ),
          },
          { key: 'by', header: 'by', cell: (reading) => sayReader(reading) },
          { key: 'at', header: 'on', cell: ({ at }) => sayMoment(at) },
          { key: 'counts', header: 'counts', cell: (reading) => sayStanding(reading) },
          ...(canTakeBack
            ? [
                {
                  key: 'deeds',
                  header: 'yours',
                  bare: true,
                  cell: (reading: ReadingShown) =>
                    reading.isMine && stands(reading) ? (
                      <Button disabled={takeBack.isPending} onClick={() => takeBack.mutate(reading.id)}>
                        Take it back
                      </Button>
                    ) : null,
                },
              ]
            : []),
        ]}
      />
      <ActTrouble act={takeBack} />
      {takenBack && !canTakeBack && (
        <p role="status" className="mt-3 flex flex-wrap items-center gap-3">
          Your reading is taken back. It stays on record and no longer counts.
          {can.read && <ButtonLink to={paths.readMark(id)}>Read it again</ButtonLink>}
        </p>
      )}
    </>
  );
}

function stands({ takenBackAt, replaced }: ReadingShown): boolean {
  return takenBackAt === null && !replaced;
}

function sayReader({ by, isMine, asHolder }: ReadingShown): string {
  const notes = [...(isMine ? ['you'] : []), ...(asHolder ? ['held the part'] : [])];
  return notes.length === 0 ? by : `${by} (${notes.join(', ')})`;
}

/** Whether a reading counts, and why not. */
export function sayStanding({ takenBackAt, replaced, independent }: Pick<ReadingShown, 'takenBackAt' | 'replaced' | 'independent'>): string {
  if (takenBackAt !== null) return `no: taken back ${sayMoment(takenBackAt)}`;
  if (replaced) return 'no: the same reader read it again';
  return independent ? 'yes' : 'not by itself: its reader had seen what others read';
}
