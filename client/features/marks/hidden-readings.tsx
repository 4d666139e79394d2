import { useMutation, useQueryClient } from '@tanstack/react-query';
import { lookUpReadings } from '#contract/marks.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { markKeys, markPage } from './marks-queries.ts';

/** For a member who has not read the mark yet, while another reading is wanted: read it first, or be shown and no longer count. */
export function HiddenReadings({ id }: { readonly id: string }) {
  const queryClient = useQueryClient();
  const look = useMutation({
    mutationFn: () => call(lookUpReadings, { params: { id } }),
    onSuccess: (answer) => {
      queryClient.setQueryData(markPage(id).queryKey, answer);
      void queryClient.invalidateQueries({ queryKey: markKeys.allToRead });
      void queryClient.invalidateQueries({ queryKey: markKeys.lists });
    },
  });
  return (
    <div className="max-w-measure">
      <p>
        Another reading is wanted, and one is worth most from somebody who has not seen what others made of it. So their readings, what the mark can mean and the part it stands on are kept
        from you until yours is saved.
      </p>
      <div className="mt-4">
        <ButtonLink weight="primary" to={paths.readMark(id)}>
          Read it first
        </ButtonLink>
      </div>
      <div className="mt-6 border-t border-rule pt-4">
        <p className="mb-3 text-slag">You can look at once. A reading you make afterwards then no longer counts as independent, and can’t confirm the mark; that can’t be undone.</p>
        <ActTrouble act={look} />
        <Button disabled={look.isPending} onClick={() => look.mutate()}>
          Show me what others read
        </Button>
      </div>
    </div>
  );
}
