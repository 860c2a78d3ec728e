import { type AnswerOf } from '../../core/http/route';

type Invitation = AnswerOf<'invitations.send'>;

export interface InvitationRow {
  id: string;
  shop_id: string;
  email: string;
  name: string;
  role: Invitation['role'];
  client_id: string | null;
  client_name: string | null;
  store_id: string | null;
  expires_at: Date;
  accepted_at: Date | null;
  withdrawn_at: Date | null;
  created_at: Date;
  mailed: number;
}

export const invitationColumns = `i.id, i.shop_id, i.email, i.name, i.role, i.client_id,
  i.client_name, i.store_id, i.expires_at, i.accepted_at, i.withdrawn_at, i.created_at, i.mailed`;

/** The same in SQL, for the filter of the list; the two are compared in test/api/invitations. */
export const stateConditions: Record<Invitation['state'], string> = {
  accepted: 'i.accepted_at is not null',
  withdrawn: 'i.accepted_at is null and i.withdrawn_at is not null',
  run_out: 'i.accepted_at is null and i.withdrawn_at is null and i.expires_at <= $now',
  open: 'i.accepted_at is null and i.withdrawn_at is null and i.expires_at > $now',
};

export function stateOf(row: InvitationRow, now: Date): Invitation['state'] {
  if (row.accepted_at) return 'accepted';
  if (row.withdrawn_at) return 'withdrawn';
  return row.expires_at > now ? 'open' : 'run_out';
}

export function presentInvitation(row: InvitationRow, now: Date): Invitation {
  return {
    id: row.id,
    email: row.email,
    name: row.name,
    role: row.role,
    clientId: row.client_id,
    clientName: row.client_name,
    storeId: row.store_id,
    state: stateOf(row, now),
    expiresAt: row.expires_at.toISOString(),
    createdAt: row.created_at.toISOString(),
  };
}

/** As in "asks you to join as a tech". */
export function invitedAs(row: Pick<InvitationRow, 'role' | 'client_name'>): string {
  const roles: Record<Invitation['role'], string> = {
    shop_owner: 'as an owner of the shop',
    office: 'in the office',
    tech: 'as a tech',
    client_owner: `as the owner of ${row.client_name ?? 'a laundry'}`,
    attendant: `as an attendant of ${row.client_name ?? 'a laundry'}`,
  };
  return roles[row.role];
}

export function isCrewRole(role: Invitation['role']): boolean {
  return role === 'shop_owner' || role === 'office' || role === 'tech';
}
