import { randomBytes } from 'node:crypto';
import path from 'node:path';
import { readState, writeState } from '../process/state-file';

export interface Secrets {
  sessionSecret: string;
  stripeKey: string;
  stripeWebhookSecret: string;
}

/** Made once per data folder, so that a restart signs nobody out. */
export function localSecrets(dataDir: string): Secrets {
  const file = path.join(dataDir, 'secrets.json');
  const known = readState<Secrets>(file);
  if (known) return known;
  const secrets: Secrets = {
    sessionSecret: randomBytes(32).toString('hex'),
    stripeKey: `sk_test_${randomBytes(12).toString('hex')}`,
    stripeWebhookSecret: `whsec_${randomBytes(16).toString('hex')}`,
  };
  writeState(file, secrets);
  return secrets;
}
