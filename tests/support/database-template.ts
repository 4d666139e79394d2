import type { TestProject } from 'vitest/node';
import { createDemoDatabase, dropDatabases, testRun } from './test-databases.ts';

declare module 'vitest' {
  // Vitest's own interface, which each provider adds to.
  interface ProvidedContext {
    readonly testRun: { readonly adminUrl: string; readonly name: string };
    readonly templateDatabase: string;
  }
}

/** Once a run: the database every test file clones its own from. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const run = testRun();
  const template = await createDemoDatabase(run);
  project.provide('testRun', run);
  project.provide('templateDatabase', template);
  return () => dropDatabases(run.adminUrl, [template]);
}
