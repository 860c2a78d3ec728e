import { type Request, type Response } from 'express';
import { v7 as uuid } from 'uuid';
import { record } from '../../core/audit';
import { readAccessToken } from '../../core/auth/access-token';
import { tokenHash } from '../../core/auth/mailed-token';
import { hashPassword } from '../../core/auth/password';
import { config } from '../../core/config';
import { type Context, type PublicContext } from '../../core/context';
import { platformRow, platformRows, row, withTenant, write } from '../../core/database/tenancy';
import { refuseWhilePaused } from '../../core/http/paused';
import { type AnswerOf, type InputOf } from '../../core/http/route';
import { announce } from '../../core/live/live';
import { found, invalid, problem } from '../../core/problems/problem';
import { addCrewProfile } from '../crew/add-crew-profile';
import { giveDevice, giveRefreshToken } from '../session/cookies';
import { demandGoodPassword } from '../session/good-password';
import { personByEmail } from '../session/people';
import { sessionAnswer, type SessionAnswer } from '../session/session-answer';
import { startSession } from '../session/start-session';
import { countUsage, refusePastLimit } from '../subscription/plan-limits';
import { invitationColumns, type InvitationRow, isCrewRole, stateOf } from './invitation-row';

/** What the holder of the link is invited to. A link that ran out is answered like none. */
export async function lookAtInvitation(
  context: PublicContext,
  token: string,
): Promise<AnswerOf<'invitations.look'>> {
  const invitation = await invitationOf(context, token);
  const person = await personByEmail(invitation.email);
  return {
    shopName: invitation.shop_name,
    role: invitation.role,
    clientName: invitation.client_name,
    email: invitation.email,
    name: invitation.name,
    known: person !== undefined,
  };
}

/**
 * Lets the invited person in. Who is new gets an account: the link came by mail, so the address is
 * theirs. Who has an account must be signed in to it, because a link alone must not open an account
 * that a password and one-time codes protect.
 */
export async function acceptInvitation(
  context: PublicContext,
  token: string,
  body: InputOf<'invitations.accept'>['body'],
  http: { request: Request; response: Response },
): Promise<SessionAnswer> {
  const invitation = await invitationOf(context, token);
  const known = await personByEmail(invitation.email);
  const claims = readAccessToken(http.request.get('authorization'), config().sessionSecret);
  if (known && claims?.sub !== known.id) {
    throw problem('not-signed-in', `Sign in as ${invitation.email} to accept.`);
  }
  // Asked before an account is made for nothing, and again where the membership is written.
  const shop = inShop(context, invitation);
  await withTenant(shop, () => demandRoom(shop, invitation));
  const person = known ?? (await addPerson(context, invitation, body));
  const membershipId = await join({ ...shop, userId: person.id, name: person.name }, invitation);
  const as = { shopId: invitation.shop_id, membershipId };
  const sessionId = known && claims ? claims.sid : await newDevice(context, person, as, http);
  await platformRows(
    `update sessions set shop_id = $shopId, membership_id = $membershipId where id = $sessionId`,
    { ...as, sessionId },
  );
  return sessionAnswer(sessionId, context.now);
}

async function newDevice(
  context: PublicContext,
  person: { id: string; email: string },
  as: { shopId: string; membershipId: string },
  { response }: { response: Response },
): Promise<string> {
  const { sessionId, refreshToken } = await startSession(context, person.id, as);
  giveRefreshToken(response, refreshToken);
  giveDevice(response, person.email);
  return sessionId;
}

type Found = InvitationRow & { shop_name: string };

async function invitationOf(context: PublicContext, token: string): Promise<Found> {
  const invitation = found(
    await platformRow<Found>(
      `select ${invitationColumns}, s.name as shop_name
       from invitations i join shops s on s.id = i.shop_id where i.token_hash = $hash`,
      { hash: tokenHash(token) },
    ),
  );
  return found(stateOf(invitation, context.now) === 'open' ? invitation : undefined);
}

async function addPerson(
  context: PublicContext,
  invitation: Found,
  body: InputOf<'invitations.accept'>['body'],
): Promise<{ id: string; name: string; email: string }> {
  const name = body.name ?? invitation.name;
  if (body.password === undefined) {
    throw invalid([{ pointer: '/password', in: 'body', detail: 'is needed for a new account' }]);
  }
  demandGoodPassword(body.password, [name, invitation.email, invitation.shop_name]);
  const [added] = await platformRows<{ id: string }>(
    `insert into users (id, email, name, password_hash, email_verified_at)
     values ($id, $email, $name, $hash, $now) on conflict (email) do nothing returning id`,
    {
      id: uuid(),
      email: invitation.email,
      name,
      hash: await hashPassword(body.password),
      now: context.now,
    },
  );
  // Two tabs at once: the other was first, and its answer has signed this browser in.
  if (!added) throw problem('conflict', 'This invitation is being accepted already.');
  return { id: added.id, name, email: invitation.email };
}

function inShop(context: PublicContext, invitation: Found): Context {
  return {
    requestId: context.requestId,
    now: context.now,
    shopId: invitation.shop_id,
    userId: null,
    membershipId: null,
    name: invitation.name,
    role: invitation.role,
    clientId: null,
    storeId: null,
  };
}

async function demandRoom(shop: Context, invitation: Found): Promise<void> {
  await refuseWhilePaused(shop);
  if (isCrewRole(invitation.role)) await refusePastLimit(shop, 'crew', 1);
}

/** The membership, the mark of a crew member and the invitation's end are one write of the shop. */
function join(shop: Context, invitation: Found): Promise<string> {
  return withTenant(shop, async () => {
    const [accepted] = await write(
      `update invitations set accepted_at = $now
       where shop_id = $shopId and id = $id and accepted_at is null and withdrawn_at is null
       returning id`,
      { shopId: shop.shopId, id: invitation.id, now: shop.now },
    );
    if (!accepted) throw problem('conflict', 'This invitation was accepted or withdrawn just now.');
    const bind = {
      shopId: shop.shopId,
      userId: shop.userId,
      role: invitation.role,
      clientId: invitation.client_id,
      storeId: invitation.store_id,
    };
    const present = await row<{ id: string }>(
      `select id from memberships where shop_id = $shopId and user_id = $userId and role = $role
       and client_id is not distinct from $clientId::uuid
       and store_id is not distinct from $storeId::uuid and ended_at is null`,
      bind,
    );
    if (present) return present.id;
    await demandRoom(shop, invitation);
    const id = uuid();
    await write(
      `insert into memberships (shop_id, id, user_id, role, client_id, store_id, name, email)
       values ($shopId, $id, $userId, $role, $clientId, $storeId, $name, $email)`,
      { ...bind, id, name: shop.name, email: invitation.email },
    );
    if (isCrewRole(invitation.role)) {
      await addCrewProfile(shop, id, shop.name);
      await countUsage(shop);
    }
    const subject = { kind: 'membership', id };
    await record(shop, 'invitation accepted', subject, { role: invitation.role });
    await announce(shop, 'crew', id);
    await announce(shop, 'invitations', invitation.id);
    return id;
  });
}
