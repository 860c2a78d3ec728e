import { platformRow } from '../../core/database/tenancy';

const anHour = 5;

/** Whether an address got so many mails lately that asking for more looks like pestering. */
export async function tooManyMails(email: string): Promise<boolean> {
  const sent = await platformRow<{ n: number }>(
    `select count(*)::int as n from platform_mails
     where created_at > now() - interval '1 hour' and recipient = $email
       and template in ('confirm_sign_up', 'reset_password')`,
    { email },
  );
  return (sent?.n ?? 0) >= anHour;
}
