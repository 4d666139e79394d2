/** What a file that is no photo for us is: of a kind not taken, or of one that is and wrong all the same. */
export type Unusable = 'kind' | 'content';

/** A file is refused, or given up, for what it is; trying again would not help. `reason` is a sentence for whoever sent it. */
export class UnusablePictureError extends Error {
  readonly unusable: Unusable;
  readonly reason: string;

  constructor(unusable: Unusable, reason: string, options?: ErrorOptions) {
    super(reason, options);
    this.name = 'UnusablePictureError';
    this.unusable = unusable;
    this.reason = reason;
  }
}
