import type { ContributionPage } from '#contract/contributions.ts';
import { ProblemError, UnreachableError } from '../../lib/problem-error.ts';
import { isSameDraft } from './draft-values.ts';
import type { Draft } from './draft-values.ts';
import type { DraftShelf } from './kept-drafts.ts';

/** Long enough to finish a word, short enough that closing the lid loses nothing. */
const PAUSE_MS = 800;
/** Between attempts while the register can't be reached. */
const AGAIN_MS = 10_000;

/**
 * Where the words of a draft are. `waiting`: on their way to the register. `kept`: only on this device, because of `error`.
 * `conflict`: it was saved elsewhere meanwhile, as `theirs` says, and nothing goes out until one of the two is chosen.
 */
export type Saving =
  | { readonly state: 'saved'; readonly at: Date | null }
  | { readonly state: 'waiting' }
  | { readonly state: 'kept'; readonly error: Error }
  | { readonly state: 'conflict'; readonly theirs: ContributionPage };

export type DraftState = { readonly draft: Draft; readonly saving: Saving };

export type SaveRequest = { readonly revision: number; readonly draft: Draft; readonly baseVersion?: number };

type Means = {
  readonly contribution: ContributionPage;
  readonly save: (request: SaveRequest) => Promise<ContributionPage>;
  readonly load: () => Promise<ContributionPage>;
  readonly shelf: DraftShelf;
  /** The register has it, or told how it stands now. */
  readonly onAnswer: (contribution: ContributionPage) => void;
};

export type DraftStore = {
  readonly subscribe: (listener: () => void) => () => void;
  readonly state: () => DraftState;
  /** How the register last told that it stands. */
  readonly latest: () => ContributionPage;
  /** Takes up what this device kept from before, once. */
  readonly resume: () => void;
  readonly change: (change: (draft: Draft) => Draft) => void;
  /** Saves at once what waits; true once the register has all of it. */
  readonly flush: () => Promise<boolean>;
  /** Of a conflict: writes this draft over what was saved elsewhere, or takes that in its place. */
  readonly settle: (choice: 'ours' | 'theirs') => void;
  /** Goes on from the version that is in force now. */
  readonly carryOver: (baseVersion: number) => Promise<boolean>;
  /** The draft is no more: nothing of it is kept or sent. */
  readonly forget: () => void;
};

function draftOf({ payload, citations, note }: ContributionPage): Draft {
  return { payload, citations, note };
}

/**
 * One draft as it is typed, saved after each pause, one saving at a time, each naming the revision it was made on. Until the register
 * has answered, the device keeps a copy, so that a reload, a dead line or an ended session loses nothing.
 */
export function createDraftStore({ contribution, save, load, shelf, onAnswer }: Means): DraftStore {
  const listeners = new Set<() => void>();
  let latest = contribution;
  let base: number | undefined;
  let changed = false;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let sending: Promise<boolean> | null = null;
  let state: DraftState = { draft: draftOf(contribution), saving: { state: 'saved', at: null } };

  const set = (next: Partial<DraftState>): void => {
    state = { ...state, ...next };
    for (const listener of listeners) listener();
  };
  const later = (pause: number): void => {
    clearTimeout(timer);
    timer = setTimeout(() => void send(), pause);
  };

  const takeUp = (theirs: ContributionPage): void => {
    latest = theirs;
    changed = false;
    shelf.drop();
    set({ draft: draftOf(theirs), saving: { state: 'saved', at: null } });
  };

  /** The register said no: either somebody saved between, which a look at it shows, or what was asked can't be done. */
  const compare = async (refusal: Error): Promise<boolean> => {
    const theirs = await load();
    onAnswer(theirs);
    if (theirs.revision === latest.revision) {
      latest = theirs;
      base = undefined;
      set({ saving: { state: 'kept', error: refusal } });
    } else if (isSameDraft(state.draft, draftOf(theirs))) {
      takeUp(theirs);
      return true;
    } else {
      set({ saving: { state: 'conflict', theirs } });
    }
    return false;
  };

  const attempt = async (): Promise<boolean> => {
    const { draft } = state;
    changed = false;
    set({ saving: { state: 'waiting' } });
    try {
      const answer = await save({ revision: latest.revision, draft, ...(base === undefined ? {} : { baseVersion: base }) });
      latest = answer;
      base = undefined;
      onAnswer(answer);
    } catch (error) {
      changed = true;
      if (!(error instanceof Error)) throw error;
      if (error instanceof ProblemError && error.kind === 'conflict') {
        return await compare(error).catch((failure: unknown) => {
          set({ saving: { state: 'kept', error: failure instanceof Error ? failure : error } });
          return false;
        });
      }
      set({ saving: { state: 'kept', error } });
      if (mayPass(error)) later(AGAIN_MS);
      return false;
    }
    if (draft !== state.draft) {
      shelf.keep({ revision: latest.revision, draft: state.draft });
      later(PAUSE_MS);
      return false;
    }
    shelf.drop();
    set({ saving: { state: 'saved', at: new Date() } });
    return true;
  };

  const send = (): Promise<boolean> => {
    clearTimeout(timer);
    if (state.saving.state === 'conflict') return Promise.resolve(false);
    sending ??= attempt().finally(() => {
      sending = null;
    });
    return sending;
  };

  const flush = async (): Promise<boolean> => {
    if (sending !== null) await sending;
    if (!changed && base === undefined) return state.saving.state === 'saved';
    return send();
  };

  let resumed = false;
  const resume = (): void => {
    if (resumed) return;
    resumed = true;
    const kept = shelf.read();
    if (kept === null) return;
    if (isSameDraft(kept.draft, state.draft)) {
      shelf.drop();
      return;
    }
    changed = true;
    const isOurs = kept.revision === latest.revision;
    set({ draft: kept.draft, saving: isOurs ? { state: 'waiting' } : { state: 'conflict', theirs: contribution } });
    if (isOurs) later(0);
  };

  return {
    subscribe: (listener) => {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
    state: () => state,
    latest: () => latest,
    resume,
    change: (change) => {
      const draft = change(state.draft);
      changed = true;
      shelf.keep({ revision: latest.revision, draft });
      const isHeldUp = state.saving.state === 'conflict';
      set(isHeldUp ? { draft } : { draft, saving: { state: 'waiting' } });
      if (sending === null && !isHeldUp) later(PAUSE_MS);
    },
    flush,
    settle: (choice) => {
      if (state.saving.state !== 'conflict') return;
      const { theirs } = state.saving;
      if (choice === 'theirs') {
        takeUp(theirs);
        return;
      }
      latest = theirs;
      shelf.keep({ revision: latest.revision, draft: state.draft });
      set({ saving: { state: 'waiting' } });
      void send();
    },
    carryOver: async (baseVersion) => {
      if (sending !== null) await sending;
      base = baseVersion;
      return send();
    },
    forget: () => {
      clearTimeout(timer);
      changed = false;
      shelf.drop();
    },
  };
}

function mayPass(error: Error): boolean {
  return error instanceof UnreachableError || (error instanceof ProblemError && (error.kind === 'unavailable' || error.kind === 'internal' || error.kind === 'too-many-requests'));
}
