import { randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { parseReading, writeReading } from '#domain/marks/reading.ts';
import { parseSerial } from '#domain/serials/serial.ts';
import { Account } from '#db/models/account.ts';
import { Anchor } from '#db/models/anchor.ts';
import { Casting } from '#db/models/casting.ts';
import { Fitment } from '#db/models/fitment.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Machine } from '#db/models/machine.ts';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { Mark } from '#db/models/mark.ts';
import { Member } from '#db/models/member.ts';
import { PartFitting } from '#db/models/part-fitting.ts';
import { PartType } from '#db/models/part-type.ts';
import { Part } from '#db/models/part.ts';
import { Photo } from '#db/models/photo.ts';
import { Picture } from '#db/models/picture.ts';
import { Position } from '#db/models/position.ts';
import { Reading } from '#db/models/reading.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { SeriesAccount } from '#db/models/series-account.ts';
import { Series } from '#db/models/series.ts';
import { Source } from '#db/models/source.ts';
import { settleMark } from '#server/services/marks/settle-mark.ts';
import { addFact, addMaker } from './catalogue.ts';

/** A small county for tests: models with serials and positions, castings, machines, and parts with marks on them. */

let made = 0;

function next(): number {
  made += 1;
  return made;
}

export async function addModel(given: Partial<MachineModel>, trx: Knex): Promise<MachineModel> {
  const place = next();
  const makerId = given.makerId ?? (await addMaker({}, trx)).id;
  const id = await addFact('model', trx);
  return MachineModel.query(trx).insertAndFetch({ id, slug: `test-model-${place}`, name: `Model ${place}`, machineKind: 'lathe', made: null, note: null, ...given, makerId });
}

export async function addPartType(given: Partial<PartType>, trx: Knex): Promise<PartType> {
  const place = next();
  const id = await addFact('part-type', trx);
  return PartType.query(trx).insertAndFetch({ id, slug: `test-part-type-${place}`, name: `Part type ${place}`, note: null, caution: null, ...given });
}

/** A position of a model for a part type, both its own unless they are given. */
export async function addPosition(given: Partial<Position>, trx: Knex): Promise<Position> {
  const place = next();
  const modelId = given.modelId ?? (await addModel({}, trx)).id;
  const partTypeId = given.partTypeId ?? (await addPartType({}, trx)).id;
  const id = await addFact('position', trx);
  return Position.query(trx).insertAndFetch({
    id, slug: `position-${place}`, name: `Position ${place}`, ordinal: place, weight: 1, lead: null, note: null, ...given, modelId, partTypeId,
  });
}

export async function addCasting(given: Partial<Casting>, trx: Knex): Promise<Casting> {
  const place = next();
  const makerId = given.makerId ?? (await addMaker({}, trx)).id;
  const partTypeId = given.partTypeId ?? (await addPartType({}, trx)).id;
  const id = await addFact('casting', trx);
  return Casting.query(trx).insertAndFetch({
    id, pouredById: null, slug: `test-casting-${place}`, number: `T${place}`, pattern: null, made: null, note: null, ...given, makerId, partTypeId,
  });
}

export async function addFitment(given: Partial<Fitment> & Pick<Fitment, 'castingId' | 'positionId' | 'verdict'>, trx: Knex): Promise<Fitment> {
  const { modelId, partTypeId } = await Position.query(trx).findById(given.positionId).throwIfNotFound();
  const id = await addFact('fitment', trx);
  return Fitment.query(trx).insertAndFetch({ id, modelId, partTypeId, seriesId: null, numbers: { from: null, to: null }, note: null, ...given });
}

export async function addSeries(given: Partial<Series>, trx: Knex): Promise<Series> {
  const model = given.modelId === undefined ? await addModel({}, trx) : await MachineModel.query(trx).findById(given.modelId).throwIfNotFound();
  const id = await addFact('series', trx);
  return Series.query(trx).insertAndFetch({ id, prefix: '', worksId: null, label: null, note: null, ...given, modelId: model.id, makerId: model.makerId });
}

/** An account of a source of its own. */
export async function addAccount(title: string, trx: Knex): Promise<Account> {
  const slug = `test-account-${next()}`;
  const member = await Member.query(trx).orderBy('id').first().throwIfNotFound();
  const source = await Source.query(trx).insert({ id: uuidV7(), slug, kind: 'book', title, enteredById: member.id, enteredAt: '2026-01-02T03:04:05.000Z' });
  return Account.query(trx).insert({ id: uuidV7(), slug, title, sourceId: source.id });
}

/** A range of a series by an account; the first account of a series is the one it goes by. */
export async function addRange(given: Partial<SerialRange> & Pick<SerialRange, 'seriesId' | 'accountId' | 'numbers' | 'built'>, trx: Knex): Promise<SerialRange> {
  const { seriesId, accountId } = given;
  const others = await SeriesAccount.query(trx).where({ seriesId });
  if (!others.some((one) => one.accountId === accountId)) await SeriesAccount.query(trx).insert({ seriesId, accountId, preferred: others.length === 0 });
  const id = await addFact('serial-range', trx);
  return SerialRange.query(trx).insertAndFetch({
    id, slug: `test-range-${next()}`, precision: 'day', standing: 'solid', inOrder: false, meaning: 'built', note: null, ...given,
  });
}

export async function addAnchor(given: Pick<Anchor, 'seriesId' | 'number' | 'built'>, trx: Knex): Promise<Anchor> {
  const id = await addFact('anchor', trx);
  return Anchor.query(trx).insertAndFetch({ id, precision: 'day', meaning: 'built', note: null, ...given });
}

export async function addMachine(given: Partial<Machine> & Pick<Machine, 'modelId' | 'serialAsStamped'>, trx: Knex): Promise<Machine> {
  const series = await Series.query(trx).where({ modelId: given.modelId });
  const serial = parseSerial(given.serialAsStamped, series.map(({ prefix }) => prefix));
  if (!serial.ok) throw new Error(`no serial: ${given.serialAsStamped}`);
  const { prefix, number, suffix } = serial.value;
  return Machine.query(trx).insertAndFetch({
    id: uuidV7(), ownerId: await someMember(trx), prefix, number: String(number), suffix, nickname: null, visibility: 'public', serialShown: false, ...given,
  });
}

export async function addPart(given: Partial<Part>, trx: Knex): Promise<Part> {
  return Part.query(trx).insertAndFetch({ id: uuidV7(), holderId: await someMember(trx), partTypeId: null, makerId: null, castingId: null, visibility: 'public', ...given });
}

/** Fits a part to a machine now. */
export async function fitPart(part: Part, machine: Machine, position: Position, trx: Knex): Promise<PartFitting> {
  const { modelId } = machine;
  return PartFitting.query(trx).insert({ id: uuidV7(), partId: part.id, machineId: machine.id, positionId: position.id, modelId, fitted: { from: '2026-01-01', to: null } });
}

/** A mark on a part with one reading. */
export async function addMark(part: Part, kind: Mark['kind'], text: string, trx: Knex): Promise<Mark> {
  const mark = await Mark.query(trx).insert({ id: uuidV7(), partId: part.id, machineId: null, kind, technique: 'cast' });
  await addReading(mark, text, await someMember(trx), trx);
  return Mark.query(trx).findById(mark.id).throwIfNotFound();
}

/** One more reading of a mark, which is settled with it. */
export async function addReading(mark: Pick<Mark, 'id'>, text: string, readerId: string, trx: Knex, madeAt?: string): Promise<Reading> {
  const reading = parseReading(text);
  if (!reading.ok) throw new Error(reading.fault.message);
  return trx.transaction(async (inner) => {
    const made = await Reading.query(inner).insert({ id: uuidV7(), markId: mark.id, readerId, text: writeReading(reading.value), ...(madeAt === undefined ? {} : { madeAt }) });
    await settleMark(mark.id, inner);
    return made;
  });
}

/** A photo of a member's whose renditions are still to be made, of a picture nobody else has. */
export async function addPhoto(ownerId: string, trx: Knex): Promise<Photo> {
  const picture = await Picture.query(trx).insert({
    id: uuidV7(), digest: randomBytes(32), storeKey: randomBytes(16).toString('hex'), type: 'jpeg', bytes: '1000', width: 640, height: 480, state: 'waiting', failure: null,
  });
  return Photo.query(trx).insertAndFetch({ id: uuidV7(), ownerId, pictureId: picture.id, address: randomBytes(16).toString('hex'), name: 'gear case.jpg', takenOn: null });
}

/** Puts a photo of its holder's on a mark, which is settled with it. */
export async function photograph(mark: Pick<Mark, 'id' | 'partId'>, trx: Knex): Promise<Photo> {
  const part = await Part.query(trx).findById(String(mark.partId)).throwIfNotFound();
  const photo = await addPhoto(part.holderId, trx);
  await MarkPhoto.query(trx).insert({ markId: mark.id, photoId: photo.id, ordinal: 0 });
  await trx.transaction((inner) => settleMark(mark.id, inner));
  return photo;
}

async function someMember(trx: Knex): Promise<string> {
  return (await Member.query(trx).orderBy('id').first().throwIfNotFound()).id;
}
