import type { RenditionName, RenditionType } from '#domain/vocabulary.ts';
import { RegisterModel } from './register-model.ts';

/** One file of a picture in the photo store, made from its original. */
export class PictureFile extends RegisterModel {
  static override readonly tableName = 'picture_files';
  static override readonly idColumn = ['pictureId', 'rendition', 'width', 'type'];

  declare pictureId: string;
  declare rendition: RenditionName;
  declare type: RenditionType;
  declare width: number;
  declare height: number;
  /** A number as text. */
  declare bytes: string;
  /** SHA-256. */
  declare digest: Buffer;
}
