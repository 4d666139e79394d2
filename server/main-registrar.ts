import { connect } from '#db/connection.ts';
import { Email } from '#contract/people.ts';
import { ConfigError, loadConfig } from './config.ts';
import { makeRegistrar } from './services/people/make-registrar.ts';
import type { MadeRegistrar } from './services/people/make-registrar.ts';

const USAGE = 'Say whose: npm run registrar -- ADDRESS';

const WORDS: Readonly<Record<MadeRegistrar, string>> = {
  made: 'is a registrar now. They sign in anew, and add a second factor before they can act.',
  unknown: 'is no member’s address. They sign up first.',
  'not-verified': 'was never confirmed. They follow the link in their letter first.',
  suspended: 'is a suspended member’s. A registrar lifts the suspension first.',
  already: 'is a registrar’s already.',
};

/** `npm run registrar -- ADDRESS`: makes a member with a confirmed address a registrar, as the first one is made. Answers the exit code. */
async function main(address: string | undefined): Promise<number> {
  const email = Email.safeParse(address);
  if (!email.success) {
    process.stderr.write(`${USAGE}\n`);
    return 2;
  }
  const knex = connect(loadConfig().databaseUrl, { poolSize: 1, applicationName: 'pourbook registrar' });
  try {
    const made = await makeRegistrar(email.data, knex);
    const line = `${email.data} ${WORDS[made]}\n`;
    if (made === 'made') process.stdout.write(line);
    else process.stderr.write(line);
    return made === 'made' ? 0 : 1;
  } finally {
    await knex.destroy();
  }
}

try {
  process.exitCode = await main(process.argv[2]);
} catch (error) {
  if (!(error instanceof ConfigError)) throw error;
  process.stderr.write(`${error.message}\n`);
  process.exitCode = 2;
}
