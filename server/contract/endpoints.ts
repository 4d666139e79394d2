import {
  changeEmail,
  changeName,
  changePassword,
  closeAccount,
  confirmIdentity,
  endOtherSessions,
  endSession,
  exportMine,
  forgotPassword,
  listSessions,
  readMe,
  resetPassword,
  signIn,
  signOut,
  signUp,
  verifyEmail,
} from './accounts.ts';
import { listCastings, readCasting, readCastingHistory } from './castings.ts';
import { listCiphers, readCipher, readCipherHistory } from './ciphers.ts';
import { decodeMark } from './decode.ts';
import type { Endpoint } from './endpoint.ts';
import { judgeFitOfPart } from './fit.ts';
import { listMakers, readMaker, readMakerHistory } from './makers.ts';
import { listModels, readBuild, readModel, readModelHistory } from './models.ts';
import { chooseNotices, listNotices, markNoticesRead, readNoticeChoices, unsubscribe } from './notices.ts';
import { listPartTypes, readPartType, readPartTypeHistory } from './part-types.ts';
import { listSerialRanges, readSerialRange, readSerialRangeHistory } from './serial-ranges.ts';
import { listSources, readSource, readSourceHistory } from './sources.ts';

/** Every endpoint there is, under its operation id. The OpenAPI description and the mounting test go through this list. */
export const ENDPOINTS = {
  decodeMark,
  judgeFitOfPart,
  readBuild,
  listMakers,
  readMaker,
  readMakerHistory,
  listModels,
  readModel,
  readModelHistory,
  listPartTypes,
  readPartType,
  readPartTypeHistory,
  listCastings,
  readCasting,
  readCastingHistory,
  listCiphers,
  readCipher,
  readCipherHistory,
  listSerialRanges,
  readSerialRange,
  readSerialRangeHistory,
  listSources,
  readSource,
  readSourceHistory,
  signUp,
  verifyEmail,
  signIn,
  signOut,
  forgotPassword,
  resetPassword,
  readMe,
  changeName,
  changePassword,
  changeEmail,
  confirmIdentity,
  closeAccount,
  listSessions,
  endSession,
  endOtherSessions,
  exportMine,
  listNotices,
  markNoticesRead,
  readNoticeChoices,
  chooseNotices,
  unsubscribe,
} as const satisfies Record<string, Endpoint>;
