import { join } from 'node:path';

/** The project's folder. Every npm script runs from here. */
export const ROOT = join(__dirname, '..', '..');

/** Where what is the installation's own lies: cluster, uploads, secrets, stamps. Never committed. */
export const DATA_FOLDER = join(ROOT, '.fettle');

/** Where the built application lies. */
export const DIST = join(ROOT, 'dist');
