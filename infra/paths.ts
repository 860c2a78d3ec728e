import path from 'node:path';
import { Advice } from './bootstrap/progress.cjs';

/** The checkout. */
export const root = path.resolve(__dirname, '..');

/** Where everything of this machine's own lies: database, mails, files, secrets, logs. */
export function dataFolder(): string {
  return path.resolve(root, process.env.DATA_DIR || '.data');
}

/** PORT, or the first port that the web application tries. */
export function wantedPort(): number {
  const asked = process.env.PORT || '4300';
  const port = Number(asked);
  if (Number.isInteger(port) && port > 0 && port < 65_000) return port;
  throw new Advice(`PORT is "${asked}".`, 'Set it to a number between 1 and 64999, or leave it.');
}
