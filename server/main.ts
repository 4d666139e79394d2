import { connect } from '#db/connection.ts';
import type { Day } from '#domain/dates/day.ts';
import { ConfigError, loadConfig } from './config.ts';
import type { Config } from './config.ts';
import { createPhotoMeans } from './files/photo-means.ts';
import { createApp } from './http/app.ts';
import { createLogger } from './http/logging.ts';
import { startServer } from './http/server.ts';
import { mailHandlings } from './jobs/mail-handlings.ts';
import { photoHandlings } from './jobs/photo-handlings.ts';
import { reworkHandlings } from './jobs/rework-handlings.ts';
import { sweepHourly } from './jobs/sweep-hourly.ts';
import { takeUpRenditions } from './jobs/take-up-renditions.ts';
import { takeUpReworks } from './jobs/take-up-reworks.ts';
import { createMailer } from './mail/mailer.ts';
import { startJobRunner } from './queue/job-runner.ts';
import { createCipherCache } from './services/cipher-cache.ts';

const MILLISECONDS_A_DAY = 86_400_000;

async function main(): Promise<void> {
  const config = configOrExit();
  const logger = createLogger(config.logLevel);
  const knex = connect(config.databaseUrl);
  const mailer = createMailer({ ...config.mail, origin: config.publicOrigin });
  const ciphers = createCipherCache({ onUnusable: (key, faults) => logger.error({ ...key, faults }, 'stored cipher does not compile') });
  const photos = createPhotoMeans(config.photos);
  const handlings = [...mailHandlings({ knex, mailer }), ...reworkHandlings({ knex, ciphers }), ...photoHandlings({ knex, photos, logger })];
  const jobs = startJobRunner({ url: config.databaseUrl, handlings, logger });
  const app = createApp({ knex, config, logger, clock: todayInUtc, jobs, photos });
  const server = await startServer(app, config);
  const stopping = new AbortController();
  const means = { knex, logger, signal: stopping.signal };
  const behind = Promise.all([takeUpReworks(means), takeUpRenditions(means), sweepHourly(means)]);

  const stop = async (signal: NodeJS.Signals): Promise<void> => {
    logger.info({ signal }, 'stopping');
    stopping.abort();
    await Promise.all([server.stop(), jobs.stop(), behind]);
    await knex.destroy();
    logger.info('stopped');
  };
  process.once('SIGTERM', (signal) => void stop(signal));
  process.once('SIGINT', (signal) => void stop(signal));
  // Said last: whoever waits for it may tell the server to stop at once.
  logger.info({ host: config.host, port: server.port, origin: config.publicOrigin }, 'listening');
}

function configOrExit(): Config {
  try {
    return loadConfig();
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error;
    process.stderr.write(`${error.message}\n`);
    return process.exit(1);
  }
}

function todayInUtc(): Day {
  return Math.floor(Date.now() / MILLISECONDS_A_DAY);
}

await main();
