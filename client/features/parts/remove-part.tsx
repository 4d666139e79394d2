import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { removePart } from '#contract/parts.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { Button } from '../../ui/button.tsx';
import { markKeys } from '../marks/marks-queries.ts';
import { photoKeys } from '../photos/photo-queries.ts';
import { ActTrouble } from '../people/act-trouble.tsx';
import { InlineStep } from '../people/inline-step.tsx';
import { partKeys } from './parts-queries.ts';

/** Takes a part off the record; that can't be undone, so it is asked twice. What others have read stays, and then the register says why. */
export function RemovePart({ id }: { readonly id: string }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const remove = useMutation({
    mutationFn: () => call(removePart, { params: { id } }),
    onSuccess: async () => {
      await navigate(paths.bench());
      // Only now: as long as its page is shown, it would be asked for again.
      queryClient.removeQueries({ queryKey: partKeys.page(id) });
      await queryClient.invalidateQueries({ queryKey: partKeys.all });
      await queryClient.invalidateQueries({ queryKey: markKeys.all });
      await queryClient.invalidateQueries({ queryKey: photoKeys.unused });
    },
  });
  const { error } = remove;
  return (
    <InlineStep label="Take it off the record">
      {(close) => (
        <>
          <p className="mb-3">The part, its marks and your readings of them can’t be had back. Its photos stay with you for 30 days.</p>
          {error instanceof ProblemError && error.kind === 'conflict' ? (
            <p role="alert" className="mb-3 font-semibold text-scale">
              {error.message}
            </p>
          ) : (
            <ActTrouble act={remove} />
          )}
          <div className="flex flex-wrap gap-3">
            <Button disabled={remove.isPending} onClick={() => remove.mutate()}>
              Take it off for good
            </Button>
            <Button onClick={close}>Keep it</Button>
          </div>
        </>
      )}
    </InlineStep>
  );
}
