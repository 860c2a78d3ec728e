import { inject, Injectable } from '@angular/core';
import { type AnswerOf, type BodyOf, type QueryOf } from '@lib/contracts/web';
import { map } from 'rxjs';
import { Api } from '../../core/api/api';

export type CrewMember = AnswerOf<'crew.show'>;
export type CrewRole = CrewMember['role'];
export type Invitation = AnswerOf<'invitations.list'>['items'][number];
type Versioned = Pick<CrewMember, 'id' | 'version'>;

@Injectable({ providedIn: 'root' })
export class CrewApi {
  readonly #api = inject(Api);

  list(query: QueryOf<'crew.list'>) {
    return this.#api.call('crew.list', { query });
  }

  show(membershipId: string) {
    return this.#api.call('crew.show', { params: { membershipId } });
  }

  change({ id, version }: Versioned, body: BodyOf<'crew.change'>) {
    return this.#api.call('crew.change', { params: { membershipId: id }, body, ifMatch: version });
  }

  end({ id, version }: Versioned) {
    return this.#api.call('crew.end', { params: { membershipId: id }, ifMatch: version });
  }

  /** Those of the crew that were not accepted yet, and still could be or have run out. */
  waitingInvitations() {
    const query = { limit: 100 };
    return this.#api
      .call('invitations.list', { query })
      .pipe(
        map(({ items }) =>
          items.filter(
            ({ clientId, state }) => clientId === null && (state === 'open' || state === 'run_out'),
          ),
        ),
      );
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
