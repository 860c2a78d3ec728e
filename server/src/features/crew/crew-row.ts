import { reachOf } from '@lib/contracts';
import { type Context } from '../../core/context';
import { instantOrNull } from '../../core/database/times';
import { type AnswerOf } from '../../core/http/route';
import { initialsFor } from './initials';

type CrewMember = AnswerOf<'crew.show'>;

export interface CrewRow {
  id: string;
  user_id: string;
  name: string;
  email: string;
  role: CrewMember['role'];
  initials: string | null;
  van: string | null;
  cost_per_hour: number | null;
  created_at: Date;
  ended_at: Date | null;
  version: number;
}

export const crewColumns = `m.id, m.user_id, m.name, m.email, m.role, m.created_at, m.ended_at,
  m.version, p.initials, p.van, p.cost_per_hour`;

export const crewFrom = `memberships m
  left join crew_profiles p on p.shop_id = m.shop_id and p.membership_id = m.id`;

export const crewRoles = `m.role in ('shop_owner', 'office', 'tech')`;

/** What a colleague costs is for those who manage the crew. */
export function presentCrewMember(context: Context, row: CrewRow): CrewMember {
  const manages = context.role !== 'system' && reachOf(context.role, 'crew.manage');
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    role: row.role,
    initials: row.initials ?? initialsFor(row.name),
    van: row.van ?? '',
    costPerHour: manages ? (row.cost_per_hour ?? 0) : null,
    since: row.created_at.toISOString(),
    endedAt: instantOrNull(row.ended_at),
    you: row.id === context.membershipId,
    version: row.version,
  };
}
