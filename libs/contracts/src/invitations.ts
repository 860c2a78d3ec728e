import { z } from 'zod';
import { listOf, listQuery } from './lists';
import { defineOperations } from './operation';
import { roles } from './permissions';
import { session } from './session';
import { email, id, line, password, token } from './text';
import { instant } from './values';

export const invitationState = z.enum(['open', 'accepted', 'withdrawn', 'run_out']);
export const invitedRole = z.enum(['shop_owner', 'office', 'tech', 'client_owner', 'attendant']);

export const invitation = z.object({
  id,
  email: z.string(),
  name: z.string(),
  role: invitedRole,
  clientId: id.nullable(),
  clientName: z.string().nullable(),
  storeId: id.nullable(),
  state: invitationState,
  expiresAt: instant,
  createdAt: instant,
});

const params = z.strictObject({ invitationId: id });

export const invitationOperations = defineOperations({
  'invitations.list': {
    method: 'GET',
    path: '/api/invitations',
    summary: 'Invitations of the shop, newest first',
    permission: 'invitations.manage',
    query: listQuery({
      sort: ['-createdAt'],
      filters: { state: invitationState.optional(), clientId: id.optional() },
    }),
    answer: listOf(invitation),
  },
  'invitations.send': {
    method: 'POST',
    path: '/api/invitations',
    summary: 'Invite a person by mail; the link is good for 14 days',
    permission: 'invitations.manage',
    body: z
      .strictObject({
        /** Crew is invited by who may manage the crew. */
        role: invitedRole,
        email,
        name: line(120),
        /** For people of a client laundry. */
        clientId: id.optional(),
        /** For an attendant: the one store they work in. */
        storeId: id.optional(),
      })
      .refine(
        (b) => (b.clientId !== undefined) === ['client_owner', 'attendant'].includes(b.role),
        {
          error: 'is given for people of a client laundry, and for them only',
          path: ['clientId'],
        },
      )
      .refine((b) => (b.storeId !== undefined) === (b.role === 'attendant'), {
        error: 'is given for an attendant, and for nobody else',
        path: ['storeId'],
      }),
    answer: invitation,
    problems: ['conflict', 'plan-limit'],
  },
  'invitations.resend': {
    method: 'POST',
    path: '/api/invitations/:invitationId/resend',
    summary: 'Mail an invitation again, good for 14 days from now',
    permission: 'invitations.manage',
    params,
    answer: invitation,
    status: 200,
    problems: ['conflict'],
  },
  'invitations.withdraw': {
    method: 'POST',
    path: '/api/invitations/:invitationId/withdraw',
    summary: 'Take an invitation back: its link no longer works',
    permission: 'invitations.manage',
    params,
    answer: invitation,
    status: 200,
    problems: ['conflict'],
  },
  'invitations.look': {
    method: 'GET',
    path: '/api/invitations/:token',
    summary: 'What an invitation is for',
    permission: 'public',
    params: z.strictObject({ token }),
    answer: z.object({
      shopName: z.string(),
      role: z.enum(roles),
      clientName: z.string().nullable(),
      email: z.string(),
      name: z.string(),
      /** Whether a person with this address can sign in already; only the mail's holder sees it. */
      known: z.boolean(),
    }),
  },
  'invitations.accept': {
    method: 'POST',
    path: '/api/invitations/:token/accept',
    summary:
      'Accept an invitation: a new person gives a name and password, a known one is signed in',
    permission: 'public',
    params: z.strictObject({ token }),
    body: z.strictObject({ name: line(120).optional(), password: password.optional() }),
    answer: session,
    status: 200,
    problems: ['not-found', 'not-signed-in', 'conflict', 'plan-limit', 'shop-paused'],
  },
});
