import { handle } from '../../core/http/route';
import { acceptInvitation, lookAtInvitation } from './accept-invitation';
import { listInvitations } from './list-invitations';
import { resendInvitation, sendInvitation, withdrawInvitation } from './send-invitation';

export const invitationsRoutes = [
  handle('invitations.list', (context, { query }) => listInvitations(context, query)),
  handle('invitations.send', (context, { body }) => sendInvitation(context, body)),
  handle('invitations.resend', (context, { params }) =>
    resendInvitation(context, params.invitationId),
  ),
  handle('invitations.withdraw', (context, { params }) =>
    withdrawInvitation(context, params.invitationId),
  ),
  handle('invitations.look', (context, { params }) => lookAtInvitation(context, params.token)),
  handle('invitations.accept', (context, { params, body }, http) =>
    acceptInvitation(context, params.token, body, http),
  ),
];
