import path from 'node:path';

/** The checkout. */
export const root = path.resolve(__dirname, '..');

/** Where everything of this machine's own lies: database, mails, files, secrets, logs. */
export function dataFolder(): string {
  return path.resolve(root, process.env.DATA_DIR || '.data');
}
