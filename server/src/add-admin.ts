import { text } from '@lib/contracts';
import { readConfig } from './core/config';
import { createLog } from './core/logging';
import { openServices } from './core/process';
import { addAdmin } from './features/platform/add-admin';

/** `node dist/server/add-admin.cjs ada@example.com "Ada Admin"`, with the web process's environment. */
async function main(): Promise<void> {
  const [address, name] = process.argv.slice(2);
  const email = text.email.safeParse(address);
  if (!email.success || !name) {
    throw new Error('Say who: add-admin.cjs ADDRESS "NAME"');
  }
  const config = readConfig();
  const close = await openServices(config, createLog('warn', 'add-admin'), 'web');
  const outcome = await addAdmin(email.data, name);
  await close();
  process.stdout.write(
    outcome === 'added'
      ? `${email.data} is a platform admin; without a password, a mail to choose one is on its way.\n`
      : `${email.data} was a platform admin already.\n`,
  );
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
