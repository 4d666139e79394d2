// @ts-check
import { realpathSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The project's folder, free of symbolic links: processes are recognised by the real path of their folder. */
export const root = realpathSync(dirname(dirname(dirname(fileURLToPath(import.meta.url)))));

/**
 * What must outlast a run: the database and its passwords.
 * @param {...string} parts
 */
export const inData = (...parts) => join(root, '.data', ...parts);

/**
 * What any run may make again.
 * @param {...string} parts
 */
export const inCache = (...parts) => join(root, '.cache', ...parts);

/**
 * A program that one of the project's packages brings.
 * @param {string} name
 */
export const packageBin = (name) => join(root, 'node_modules', '.bin', name);
