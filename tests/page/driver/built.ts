import { fileURLToPath } from 'node:url';
import { resolve } from 'node:path';

const root = fileURLToPath(new URL('../../..', import.meta.url));

/** Where everything was built. */
export const buildFolder = resolve(process.env.FORWRIGHT_BUILD ?? resolve(root, 'build'));

/** The single file that a person opens. */
export const pageFile = resolve(buildFolder, 'forwright.html');
