import { platformRow } from '../../core/database/tenancy';

/** A person as sign-in knows them. */
export interface Person {
  id: string;
  email: string;
  name: string;
  password_hash: string | null;
  email_verified_at: Date | null;
  platform_admin: boolean;
  totp_secret: string | null;
  totp_confirmed_at: Date | null;
  version: number;
}

const columns = `id, email, name, password_hash, email_verified_at, platform_admin, totp_secret,
  totp_confirmed_at, version`;

export function personByEmail(email: string): Promise<Person | undefined> {
  return platformRow<Person>(`select ${columns} from users where email = $email`, { email });
}

export function personById(id: string): Promise<Person | undefined> {
  return platformRow<Person>(`select ${columns} from users where id = $id`, { id });
}
