import { resolve } from 'node:path';

/** The folder of the checkout: programs are started there, so that `tsx` and `node_modules` are found. */
export const projectDir = resolve(import.meta.dirname, '..', '..');
