/** One source that stood behind a version, as the version keeps it. */
export type FactCitation = {
  readonly sourceId: string;
  /** `null`: behind the whole fact. */
  readonly field: string | null;
  readonly locator: string | null;
  readonly note: string | null;
};
