import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { Api } from '../../core/api/api';

export type Client = AnswerOf<'clients.show'>;
export type ClientPerson = AnswerOf<'clientPeople.list'>['items'][number];
export type Invitation = AnswerOf<'invitations.list'>['items'][number];
type Versioned = Pick<Client, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class ClientsApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'clients.list'>) {
    return this.#api.call('clients.list', { query });
  }

  show(clientId: string) {
    return this.#api.call('clients.show', { params: { clientId } });
  }

  create(body: BodyOf<'clients.create'>, key: string) {
    return this.#api.call('clients.create', { body, key });
  }

  change({ id, version }: Versioned, body: BodyOf<'clients.change'>) {
    return this.#api.call('clients.change', { params: { clientId: id }, body, ifMatch: version });
  }

  end({ id, version }: Versioned) {
    return this.#api.call('clients.end', { params: { clientId: id }, ifMatch: version });
  }

  resume({ id, version }: Versioned) {
    return this.#api.call('clients.resume', { params: { clientId: id }, ifMatch: version });
  }

  people(query: QueryOf<'clientPeople.list'>) {
    return this.#api.call('clientPeople.list', { query });
  }

  endPerson({ id, version }: Versioned) {
    return this.#api.call('clientPeople.end', { params: { membershipId: id }, ifMatch: version });
  }

  invitations(query: QueryOf<'invitations.list'>) {
    return this.#api.call('invitations.list', { query });
  }

  invite(body: BodyOf<'invitations.send'>, key: string) {
    return this.#api.call('invitations.send', { body, key });
  }

  inviteAgain(invitationId: string) {
    return this.#api.call('invitations.resend', { params: { invitationId } });
  }

  withdraw(invitationId: string) {
    return this.#api.call('invitations.withdraw', { params: { invitationId } });
  }
}
