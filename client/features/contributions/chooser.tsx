import { useId, useRef, useState } from 'react';
import type { KeyboardEvent, ReactNode } from 'react';
import { FailureNote } from '../../ui/failure-note.tsx';
import { CONTROL, Field } from '../../ui/field.tsx';
import type { FieldProps } from '../../ui/field.tsx';
import { Live } from '../../ui/live.tsx';

export type Choice = { readonly id: string; readonly title: string; /** Tells it from others of its name. */ readonly detail?: string };

/** So that not every letter is a question. */
const PAUSE_MS = 200;

type Props = FieldProps & {
  readonly chosen: Choice | null;
  /** What was found for the text last searched; undefined while it is looked for. */
  readonly found: readonly Choice[] | undefined;
  readonly failure: Error | null;
  readonly onAgain: () => void;
  /** The text to look for; null once nobody looks any more. */
  readonly onSearch: (text: string | null) => void;
  readonly onChoose: (choice: Choice | null) => void;
  /** Stands below the list where nothing was found. */
  readonly none: ReactNode;
};

/**
 * One of many, found by typing: a combobox with a list box, after the ARIA Authoring Practices. Arrows move, Enter chooses, Escape goes
 * back to what was chosen; an emptied box chooses nothing.
 */
export function Chooser({ chosen, found, failure, onAgain, onSearch, onChoose, none, ...field }: Props) {
  const listId = useId();
  const [text, setText] = useState<string | null>(null);
  const [at, setAt] = useState(0);
  const box = useRef<HTMLInputElement>(null);
  const pause = useRef<ReturnType<typeof setTimeout>>(undefined);
  const isOpen = text !== null;
  const options = isOpen ? (found ?? []) : [];
  const active = options[Math.min(at, options.length - 1)];

  const open = (): void => {
    // What stands in the box untouched is the name of what was chosen, not something to look for.
    setText(chosen?.title ?? '');
    setAt(0);
    onSearch('');
  };
  const search = (typed: string): void => {
    setText(typed);
    setAt(0);
    clearTimeout(pause.current);
    pause.current = setTimeout(() => onSearch(typed.trim()), PAUSE_MS);
  };
  const close = (): void => {
    clearTimeout(pause.current);
    setText(null);
    onSearch(null);
  };
  const choose = (choice: Choice | null): void => {
    onChoose(choice);
    close();
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
      event.preventDefault();
      if (!isOpen) open();
      else if (options.length > 0) setAt((Math.min(at, options.length - 1) + (event.key === 'ArrowDown' ? 1 : options.length - 1)) % options.length);
    } else if (event.key === 'Enter' && isOpen) {
      event.preventDefault();
      if (active !== undefined) choose(active);
    } else if (event.key === 'Escape' && isOpen) {
      event.preventDefault();
      close();
    }
  };

  return (
    <Field {...field}>
      {(control) => (
        <div
          onBlur={({ currentTarget, relatedTarget }) => {
            if (!isOpen || currentTarget.contains(relatedTarget)) return;
            if (text.trim() === '' && chosen !== null) choose(null);
            else close();
          }}
        >
          <input
            {...control}
            ref={box}
            role="combobox"
            type="text"
            autoComplete="off"
            spellCheck={false}
            aria-autocomplete="list"
            aria-expanded={isOpen}
            {...(isOpen ? { 'aria-controls': listId } : {})}
            {...(active === undefined ? {} : { 'aria-activedescendant': `${listId}-${active.id}` })}
            value={text ?? chosen?.title ?? ''}
            placeholder="Type to find one"
            className={CONTROL}
            onChange={({ target }) => search(target.value)}
            onFocus={({ target }) => target.select()}
            onClick={() => {
              if (!isOpen) open();
            }}
            onKeyDown={onKeyDown}
          />
          <Live>{isOpen && found !== undefined ? (found.length === 0 ? 'Nothing found' : `${found.length} found`) : ''}</Live>
          <ul id={listId} role="listbox" aria-label="Found" hidden={options.length === 0} className="max-h-72 overflow-y-auto border border-t-0 border-edge bg-paper">
            {options.map((option, place) => (
              <li
                key={option.id}
                id={`${listId}-${option.id}`}
                role="option"
                aria-selected={option === active}
                className="flex min-h-11 cursor-pointer flex-wrap items-center gap-x-3 border-b border-rule px-3 py-2 last:border-b-0 aria-selected:bg-bed"
                onPointerMove={() => setAt(place)}
                onPointerDown={(event) => event.preventDefault()}
                onClick={() => {
                  choose(option);
                  box.current?.focus();
                }}
              >
                {option.title}
                {option.detail !== undefined && <span className="text-[15px] text-slag">{option.detail}</span>}
              </li>
            ))}
          </ul>
          {isOpen && failure !== null && <FailureNote error={failure} onAgain={onAgain} />}
          {isOpen && failure === null && found?.length === 0 && <div className="border border-t-0 border-edge bg-paper px-3 py-2 text-slag">{none}</div>}
        </div>
      )}
    </Field>
  );
}
