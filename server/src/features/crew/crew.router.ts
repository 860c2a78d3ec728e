import { handle } from '../../core/http/route';
import { endClientPerson, listClientPeople } from './client-people';
import { listCrew, showCrewMember } from './read-crew';
import { changeCrewMember, endCrewMember } from './write-crew';

export const crewRoutes = [
  handle('crew.list', (context, { query }) => listCrew(context, query)),
  handle('crew.show', (context, { params }) => showCrewMember(context, params.membershipId)),
  handle('crew.change', (context, { params, version, body }) =>
    changeCrewMember(context, params.membershipId, version, body),
  ),
  handle('crew.end', (context, { params, version }) =>
    endCrewMember(context, params.membershipId, version),
  ),
  handle('clientPeople.list', (context, { query }) => listClientPeople(context, query)),
  handle('clientPeople.end', (context, { params, version }) =>
    endClientPerson(context, params.membershipId, version),
  ),
];
