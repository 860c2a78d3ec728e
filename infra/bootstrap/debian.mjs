// Programs from Debian's packages, when they are missing and we are allowed to install them.

import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import programs from './programs.cjs';
import progressModule from './progress.cjs';
import quietRunModule from './quiet-run.cjs';

const { Advice, progress } = progressModule;
const { quietRun } = quietRunModule;

/** The words before a command that make it run as root; undefined when we may not. */
function asRoot() {
  if (!existsSync('/usr/bin/apt-get')) return undefined;
  if (process.getuid?.() === 0) return [];
  const sudo = spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' });
  return sudo.status === 0 ? ['sudo', '-n'] : undefined;
}

async function runAsRoot(prefix, command) {
  const [program, ...args] = [...prefix, ...command];
  await quietRun(program, args, {
    todo: 'Check that Debian\'s package servers can be reached ("apt-get update"), then try again.',
  });
}

let packageListsAreFresh = false;

async function aptInstall(prefix, packages) {
  const apt = [
    'env',
    'DEBIAN_FRONTEND=noninteractive',
    'UCF_FORCE_CONFFOLD=1',
    'apt-get',
    '-q',
    '-y',
    '-o',
    'DPkg::Lock::Timeout=300',
    '-o',
    'Dpkg::Options::=--force-confold',
  ];
  if (!packageListsAreFresh) await runAsRoot(prefix, [...apt, 'update']);
  packageListsAreFresh = true;
  await runAsRoot(prefix, [...apt, 'install', '--no-install-recommends', ...packages]);
}

// Debian's package would make and start a server of its own on port 5432. Ours is private, so we
// say no beforehand, in the file that Debian reads for it; a file that is already there stays.
const withoutDebiansServer = `
set -e
mkdir -p /etc/postgresql-common
file=/etc/postgresql-common/createcluster.conf
test -e "$file" || printf 'create_main_cluster = false\\n' > "$file"
`;

export async function ensurePostgres() {
  const found = programs.findPostgres();
  if (found) return found;
  const prefix = asRoot();
  if (!prefix) {
    throw new Advice(
      'PostgreSQL 14 or newer is needed and was not found.',
      [
        'Install it, as root:',
        '    apt-get update && apt-get install -y postgresql',
        'or, on another system, put the folder of its "postgres" and "initdb" on the PATH,',
        'or set DATABASE_URL to the address of a database of your own (its owner role).',
      ].join('\n'),
    );
  }
  await progress.step('Installing PostgreSQL from Debian', async () => {
    await runAsRoot(prefix, ['sh', '-c', withoutDebiansServer]);
    await aptInstall(prefix, ['postgresql']);
  });
  const installed = programs.findPostgres();
  if (!installed) throw new Advice('PostgreSQL was installed, but its programs were not found.');
  return installed;
}

export async function ensureChromium() {
  const found = programs.findChromium();
  if (found) return found;
  const prefix = asRoot();
  if (!prefix) {
    throw new Advice(
      'The browser tests need Chromium, which was not found.',
      [
        'Install it, as root:',
        '    apt-get update && apt-get install -y chromium fonts-liberation',
        'or set CHROME_PATH to the browser.',
      ].join('\n'),
    );
  }
  await progress.step('Installing Chromium from Debian', () =>
    aptInstall(prefix, ['chromium', 'fonts-liberation']),
  );
  const installed = programs.findChromium();
  if (!installed) throw new Advice('Chromium was installed, but was not found.');
  return installed;
}
