import { Model, type Pojo } from 'objection';
import { writeRange, type CountRange, type DateRange, type NumberRange } from '#db/ranges.ts';

/**
 * What every model shares. Relations point at what a row refers to and at rows it owns; the other way round is a query on the model
 * that refers, so models never import each other in a circle.
 */
export abstract class RegisterModel extends Model {
  /** Relations are fetched one after another: inside a transaction there is one connection, and the driver takes one query at a time. */
  static readonly concurrency = 1;

  /** Names of the fields that hold a range, so that they can be written as they are read. */
  static readonly ranges: readonly string[] = [];

  override $formatDatabaseJson(json: Pojo): Pojo {
    const row = super.$formatDatabaseJson(json);
    const { ranges } = this.constructor as typeof RegisterModel;
    for (const name of ranges) {
      const range = row[name] as NumberRange | DateRange | CountRange | null | undefined;
      if (range !== undefined) row[name] = writeRange(range);
    }
    return row;
  }
}
