import { migrate } from './core/database/migrate';

const ownerUrl = process.env.DATABASE_OWNER_URL;
if (!ownerUrl) {
  process.stderr.write('DATABASE_OWNER_URL is not set: migrating needs the owner of the schema.\n');
  process.exit(1);
}
migrate({ ownerUrl, log: (line) => process.stdout.write(`${line}\n`) }).catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.stack : String(error)}\n`);
  process.exit(1);
});
