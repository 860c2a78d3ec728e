import { reachOf } from '@lib/contracts';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { mailedToken, tokenHash } from '../../core/auth/mailed-token';
import { type Context } from '../../core/context';
import { row, withTenant, write } from '../../core/database/tenancy';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid, problem } from '../../core/problems/problem';
import { queuePlatformMail } from '../platform-mails/queue-platform-mail';
import { refusePastLimit } from '../subscription/plan-limits';
import {
  invitationColumns,
  type InvitationRow,
  invitedAs,
  isCrewRole,
  presentInvitation,
} from './invitation-row';

type Invitation = AnswerOf<'invitations.send'>;
type Body = InputOf<'invitations.send'>['body'];

const goodForDays = 14;
const mostMails = 10;

/** Invites a person; the invitation, its mail and the audit are written together. */
export function sendInvitation(context: Context, body: Body): Promise<Invitation> {
  return withTenant(context, async () => {
    demandRightToInvite(context, body.role);
    const clientName = await clientNameOf(context, body);
    await refuseTwice(context, body);
    if (isCrewRole(body.role)) await refusePastLimit(context, 'crew', 1);
    const id = uuid();
    const [added] = await write<InvitationRow>(
      `insert into invitations as i (shop_id, id, email, name, role, client_id, client_name, store_id,
         token_hash, expires_at, invited_by, created_at)
       values ($shopId, $id, $email, $name, $role, $clientId, $clientName, $storeId, $tokenHash,
         $now::timestamptz + make_interval(days => $goodForDays), $invitedBy, $now)
       returning ${invitationColumns}`,
      {
        shopId: context.shopId,
        id,
        email: body.email,
        name: body.name,
        role: body.role,
        clientId: body.clientId ?? null,
        clientName,
        storeId: body.storeId ?? null,
        tokenHash: tokenHash(mailedToken('invitation', id)),
        goodForDays,
        invitedBy: context.userId,
        now: context.now,
      },
    );
    return mailed(context, found(added), 'invitation sent');
  });
}

/** Mails the same link again, good for its full time from now. */
export function resendInvitation(context: Context, invitationId: string): Promise<Invitation> {
  return withTenant(context, async () => {
    const open = await openInvitation(context, invitationId);
    demandRightToInvite(context, open.role);
    if (open.mailed >= mostMails) {
      throw problem('conflict', `This was mailed ${mostMails} times. Ask for another address.`);
    }
    const [again] = await write<InvitationRow>(
      `update invitations i set mailed = mailed + 1,
         expires_at = $now::timestamptz + make_interval(days => $goodForDays)
       where i.shop_id = $shopId and i.id = $id returning ${invitationColumns}`,
      { shopId: context.shopId, id: invitationId, goodForDays, now: context.now },
    );
    return mailed(context, found(again), 'invitation sent again');
  });
}

/** Its link answers like one that never was. */
export function withdrawInvitation(context: Context, invitationId: string): Promise<Invitation> {
  return withTenant(context, async () => {
    const open = await openInvitation(context, invitationId);
    demandRightToInvite(context, open.role);
    const [withdrawn] = await write<InvitationRow>(
      `update invitations i set withdrawn_at = $now
       where i.shop_id = $shopId and i.id = $id returning ${invitationColumns}`,
      { shopId: context.shopId, id: invitationId, now: context.now },
    );
    const subject = { kind: 'invitation', id: invitationId };
    await record(context, 'invitation withdrawn', subject, { role: open.role });
    await announce(context, 'invitations', invitationId);
    return presentInvitation(found(withdrawn), context.now);
  });
}

/** The office invites people of client laundries; into the crew only who manages it lets in. */
function demandRightToInvite(context: Context, role: Body['role']): void {
  const manages = context.role !== 'system' && reachOf(context.role, 'crew.manage');
  if (isCrewRole(role) && !manages) {
    throw problem('not-allowed', 'Only an owner of the shop invites into its crew.');
  }
}

async function clientNameOf(context: Context, body: Body): Promise<string | null> {
  if (!body.clientId) return null;
  const bind = { shopId: context.shopId, clientId: body.clientId };
  const client = await row<{ name: string }>(
    'select name from clients where shop_id = $shopId and id = $clientId and ended_at is null',
    bind,
  );
  if (!client) throw invalid([{ pointer: '/clientId', detail: 'is not a client of this shop' }]);
  if (body.storeId) {
    const store = await row(
      `select 1 from stores where shop_id = $shopId and client_id = $clientId and id = $storeId
       and ended_at is null`,
      { ...bind, storeId: body.storeId },
    );
    if (!store) throw invalid([{ pointer: '/storeId', detail: 'is not a store of this client' }]);
  }
  return client.name;
}

async function refuseTwice(context: Context, body: Body): Promise<void> {
  const bind = {
    shopId: context.shopId,
    email: body.email,
    role: body.role,
    clientId: body.clientId ?? null,
    storeId: body.storeId ?? null,
  };
  const same = `shop_id = $shopId and email = $email and role = $role
    and client_id is not distinct from $clientId::uuid
    and store_id is not distinct from $storeId::uuid`;
  if (await row(`select 1 from memberships where ${same} and ended_at is null`, bind)) {
    throw problem('conflict', 'This person is here already, in this role.');
  }
  const open = await row(
    `select 1 from invitations where ${same} and accepted_at is null and withdrawn_at is null
     and expires_at > $now`,
    { ...bind, now: context.now },
  );
  if (open) throw problem('conflict', 'This person is invited already: send that mail again.');
}

async function openInvitation(context: Context, invitationId: string): Promise<InvitationRow> {
  const invitation = found(
    await row<InvitationRow>(
      `select ${invitationColumns} from invitations i
       where i.shop_id = $shopId and i.id = $invitationId for update`,
      { shopId: context.shopId, invitationId },
    ),
  );
  if (invitation.accepted_at) throw problem('conflict', 'This invitation was accepted.');
  if (invitation.withdrawn_at) throw problem('conflict', 'This invitation was withdrawn.');
  return invitation;
}

async function mailed(context: Context, invited: InvitationRow, what: string): Promise<Invitation> {
  const shop = found(
    await row<{ name: string }>('select name from shops where id = $shopId', {
      shopId: context.shopId,
    }),
  );
  await queuePlatformMail({
    to: invited.email,
    template: 'invitation',
    params: {
      name: invited.name,
      shopName: shop.name,
      invitedBy: context.name,
      as: invitedAs(invited),
      invitationId: invited.id,
    },
    dedupeKey: `invitation:${invited.id}:${invited.mailed}`,
    shopId: context.shopId,
  });
  const subject = { kind: 'invitation', id: invited.id };
  await record(context, what, subject, { role: invited.role });
  await announce(context, 'invitations', invited.id);
  return presentInvitation(invited, context.now);
}
