import { rmSync } from 'node:fs';
import path from 'node:path';
import { Advice, progress } from './bootstrap/progress.cjs';
import { dataFolder } from './paths';
import { removeCluster } from './postgres/cluster';
import { endLeftOvers, refuseSecondStart } from './stack/run-file';

/** What a reset forgets. Anything else in the data folder is not ours and stays. */
const ours = [
  'mailbox',
  'files',
  'logs',
  'stripe.jsonl',
  'accounts.json',
  'demo.json',
  'ports.json',
  'run.json',
  'start.json',
  'secrets.json',
];

/** `npm run reset`: forgets the private database, mails and payments; the next start is fresh. */
export async function main(): Promise<void> {
  if (process.env.DATABASE_URL) {
    throw new Advice(
      'DATABASE_URL is set: this command empties the private database only.',
      'Empty that database yourself, or unset DATABASE_URL.',
    );
  }
  const dataDir = dataFolder();
  refuseSecondStart(dataDir);
  await progress.step('Forgetting the demo', async () => {
    await endLeftOvers(dataDir);
    await removeCluster(path.join(dataDir, 'postgres'));
    for (const name of ours) rmSync(path.join(dataDir, name), { recursive: true, force: true });
  });
  progress.say('  npm start makes a fresh one.');
}
