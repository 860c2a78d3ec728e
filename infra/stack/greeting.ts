import { type Account, type RunFile, runFilePath } from './run-file';
import { shortPath } from './session';

const roleNames: Record<string, string> = {
  platform_admin: 'platform admin',
  shop_owner: 'shop owner',
  office: 'office',
  tech: 'tech',
  client_owner: 'client owner',
  attendant: 'attendant',
};

function table(rows: readonly (readonly string[])[]): string {
  const widths = rows[0]?.map((_, at) => Math.max(...rows.map((row) => (row[at] ?? '').length)));
  return rows
    .map((row) => `  ${row.map((cell, at) => cell.padEnd(widths?.[at] ?? 0)).join('  ')}`.trimEnd())
    .join('\n');
}

function people(accounts: readonly Account[]): string {
  if (accounts.length === 0) return '';
  const rows = accounts.map((one) => [
    roleNames[one.role] ?? one.role,
    one.shop ?? '(the platform)',
    one.email,
    one.password,
  ]);
  return `\nSign in as:\n${table([['role', 'shop', 'email', 'password'], ...rows])}\n`;
}

/** What a newcomer needs to know once everything runs. */
export function greeting(run: RunFile, dataDir: string): string {
  const places = [
    ['Web application', run.web],
    ['Mailbox', run.mailbox ?? 'the mail server of SMTP_URL'],
    ['Card payments', run.stripe ? `${run.stripe} (local fake of Stripe)` : 'Stripe'],
    ['API document', run.apiDocument],
    ['Database', run.database.replace(/:[^:@/]+@/, ':...@')],
    ['All of this', shortPath(runFilePath(dataDir))],
    ['Logs', shortPath(`${dataDir}/logs`)],
  ];
  return `\nTumblewright runs.\n\n${table(places)}\n${people(run.accounts)}\nCtrl-C ends all of it.`;
}
