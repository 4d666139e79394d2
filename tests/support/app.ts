import type { Express } from 'express';
import type { Knex } from 'knex';
import supertest from 'supertest';
import { afterEach, beforeEach, expect, vi } from 'vitest';
import type { MockInstance } from 'vitest';
import { parseDay } from '#domain/dates/day.ts';
import type { Day } from '#domain/dates/day.ts';
import { createPhotoMeans } from '#server/files/photo-means.ts';
import { createApp } from '#server/http/app.ts';
import type { AppDependencies } from '#server/http/app.ts';
import { keptLog } from './log.ts';
import type { KeptLog } from './log.ts';
import { TEST_PHOTOS } from './test-photos.ts';

/** The day it is in tests, unless they say otherwise. */
const TODAY = '2026-12-01';

export type TestApp = {
  /** Calls this test's app, which is new for each. */
  readonly agent: supertest.Agent;
  readonly app: Express;
  readonly log: KeptLog;
};

type Settings = Partial<AppDependencies['config']> & Partial<Pick<AppDependencies, 'clock' | 'jobs' | 'photos'>>;

/** An app for each test, over that test's own connection. A request that fails on our side, or a word on the console, fails the test. */
export function useApp(database: { readonly knex: Knex }, settings: Settings = {}): TestApp {
  let current: { readonly app: Express; readonly log: KeptLog } | undefined;
  let spoken: readonly MockInstance[] = [];
  const inHand = (): { readonly app: Express; readonly log: KeptLog } => {
    if (!current) throw new Error('The app is there only while a test runs');
    return current;
  };

  beforeEach(() => {
    spoken = [vi.spyOn(console, 'error'), vi.spyOn(console, 'warn')];
    const log = keptLog();
    current = { app: appOver(database.knex, log, settings), log };
  });
  afterEach(() => {
    expect(inHand().log.takeErrors()).toEqual([]);
    for (const words of spoken) {
      expect(words).not.toHaveBeenCalled();
      words.mockRestore();
    }
    current = undefined;
  });

  return {
    get agent() {
      return supertest.agent(inHand().app);
    },
    get app() {
      return inHand().app;
    },
    get log() {
      return inHand().log;
    },
  };
}

/** The app as the server makes it, with a day that stands still and a log that is kept. */
export function appOver(knex: Knex, log: KeptLog, { clock, jobs, photos, ...config }: Settings = {}): Express {
  return createApp({
    knex,
    config: { environment: 'test', publicOrigin: 'http://127.0.0.1:5080', trustProxy: [], clientDirectory: '/nonexistent', localPostDirectory: undefined, ...config },
    logger: log.logger,
    clock: clock ?? (() => dayOf(TODAY)),
    jobs: jobs ?? { isAlive: () => true },
    photos: photos ?? createPhotoMeans({ directory: TEST_PHOTOS, bucket: undefined }),
  });
}

function dayOf(iso: string): Day {
  const day = parseDay(iso);
  if (!day.ok) throw new RangeError(day.fault.message);
  return day.value;
}
