import type { ComponentProps } from 'react';
import { TextField } from '../../ui/text-field.tsx';

type Props = Pick<ComponentProps<typeof TextField>, 'id' | 'name' | 'label' | 'hint' | 'error'>;

/** Six digits of the moment; a phone offers them by itself. */
export function CodeField(field: Props) {
  return <TextField {...field} mono inputMode="numeric" autoComplete="one-time-code" spellCheck={false} className="max-w-[340px]" />;
}
