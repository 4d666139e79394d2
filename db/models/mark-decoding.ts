import type { DecodeStatus } from '#domain/ciphers/decoding.ts';
import { RegisterModel } from './register-model.ts';

/** First and last day, ISO, and its part of the probability. */
export type DatedCandidate = { readonly from: string; readonly to: string; readonly share: number };

/** What a date mark was worked out to mean, under the cipher in force that makes it likeliest. */
export class MarkDecoding extends RegisterModel {
  static override readonly tableName = 'mark_decodings';
  static override readonly idColumn = 'markId';
  static override readonly jsonAttributes = ['candidates'];

  declare markId: string;
  /** `null`: no cipher in force can make it. */
  declare cipherId: string | null;
  declare cipherVersion: number | null;
  declare status: DecodeStatus;
  /** How many dates there are; the likeliest are in `candidates`. */
  declare total: number;
  declare candidates: readonly DatedCandidate[];
}
