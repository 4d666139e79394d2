import { keepPreviousData, queryOptions, skipToken } from '@tanstack/react-query';
import type { z } from 'zod';
import { listCastings, readCasting } from '#contract/castings.ts';
import { listCiphers, readCipher } from '#contract/ciphers.ts';
import { decodeMark } from '#contract/decode.ts';
import type { DecodeRequest } from '#contract/decode.ts';
import { judgeFitOfPart } from '#contract/fit.ts';
import type { FitRequest } from '#contract/fit.ts';
import { LIMITS } from '#contract/limits.ts';
import { listMakers } from '#contract/makers.ts';
import { listModels, readBuild, readModel } from '#contract/models.ts';
import { call } from '../../lib/call.ts';
import { listAll } from '../../lib/list-all.ts';

/** What the decode page asks the register. A question not yet complete is null, and is not asked. */

const decodeKeys = { all: ['decode'] as const };

const page = (after: string | undefined) => ({ limit: LIMITS.page.most, ...(after === undefined ? {} : { after }) });
const CASTINGS_SHOWN = 6;

export const makersToChoose = () =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'makers'],
    queryFn: ({ signal }) => listAll((after) => call(listMakers, { query: page(after), signal })),
  });

export const modelsToChoose = () =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'models'],
    queryFn: ({ signal }) => listAll((after) => call(listModels, { query: page(after), signal })),
  });

export const ciphersToChoose = (maker: string | null) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'ciphers', maker],
    queryFn: maker === null ? skipToken : ({ signal }) => listAll((after) => call(listCiphers, { query: { maker, ...page(after) }, signal })),
  });

export const cipherInHand = (slug: string | null) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'cipher', slug],
    queryFn: slug === null ? skipToken : ({ signal }) => call(readCipher, { params: { slug }, signal }),
  });

export const modelInHand = (slug: string | null) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'model', slug],
    queryFn: slug === null ? skipToken : ({ signal }) => call(readModel, { params: { slug }, signal }),
  });

export const castingInHand = (slug: string | null) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'casting', slug],
    queryFn: slug === null ? skipToken : ({ signal }) => call(readCasting, { params: { slug }, signal }),
  });

export const castingsByNumber = (number: string | null, maker: string | null) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'castings', number, maker],
    queryFn:
      number === null
        ? skipToken
        : ({ signal }) => call(listCastings, { query: { number, limit: CASTINGS_SHOWN, ...(maker === null ? {} : { maker }) }, signal }),
    placeholderData: keepPreviousData,
  });

export const decoding = (request: z.input<typeof DecodeRequest> | null) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'reading', request],
    queryFn: request === null ? skipToken : ({ signal }) => call(decodeMark, { body: request, signal }),
    placeholderData: keepPreviousData,
  });

export const buildOf = (model: string | null, serial: string) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'build', model, serial],
    queryFn: model === null || serial === '' ? skipToken : ({ signal }) => call(readBuild, { params: { slug: model }, query: { serial }, signal }),
    placeholderData: keepPreviousData,
  });

export const fitOf = (question: z.input<typeof FitRequest> | null) =>
  queryOptions({
    queryKey: [...decodeKeys.all, 'fit', question],
    queryFn: question === null ? skipToken : ({ signal }) => call(judgeFitOfPart, { body: question, signal }),
    placeholderData: keepPreviousData,
  });
