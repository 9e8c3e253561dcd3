import { fileURLToPath } from 'node:url';
import path from 'node:path';

/** The root of the checkout. */
export const root = path.resolve(fileURLToPath(new URL('../..', import.meta.url)));

/** Everything the program keeps on this machine; git ignores it. */
export const dataFolder = process.env.CAGEWRIGHT_DATA ?? path.join(root, '.data');
