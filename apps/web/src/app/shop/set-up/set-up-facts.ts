import { inject, Injectable } from '@angular/core';
import { forkJoin, map, type Observable } from 'rxjs';
import { Api } from '../../core/api/api';

/** What a fresh shop has already. */
export interface SetUpFacts {
  readonly finished: boolean;
  readonly hasAddress: boolean;
  readonly editions: number;
  readonly clients: number;
  readonly stores: number;
  readonly machines: number;
  readonly statementContacts: number;
  readonly crew: number;
  /** People of clients who sign in, or were invited to. */
  readonly clientPeople: number;
  readonly takesCards: boolean;
  /** Where there is only one, the next step leads right to it. */
  readonly onlyClientId: string | undefined;
  readonly onlyStoreId: string | undefined;
}

@Injectable({ providedIn: 'root' })
export class SetUpApi {
  readonly #api = inject(Api);

  facts(): Observable<SetUpFacts> {
    const few = { query: { limit: 2 } };
    return forkJoin({
      shop: this.#api.call('shop.show'),
      editions: this.#api.call('editions.list', few),
      clients: this.#api.call('clients.list', few),
      stores: this.#api.call('stores.list', few),
      machines: this.#api.call('machines.list', few),
      contacts: this.#api.call('contacts.list', { query: { limit: 100 } }),
      crew: this.#api.call('crew.list', few),
      people: this.#api.call('clientPeople.list', few),
      invitations: this.#api.call('invitations.list', { query: { state: 'open', limit: 100 } }),
    }).pipe(
      map((all) => ({
        finished: all.shop.setUpAt !== null,
        hasAddress: all.shop.address !== '',
        editions: all.editions.count.value,
        clients: all.clients.count.value,
        stores: all.stores.count.value,
        machines: all.machines.count.value,
        statementContacts: all.contacts.items.filter((contact) => contact.getsStatements).length,
        crew:
          all.crew.count.value +
          all.invitations.items.filter(({ clientId }) => clientId === null).length,
        clientPeople:
          all.people.count.value +
          all.invitations.items.filter(({ role }) => role === 'client_owner').length,
        takesCards: all.shop.takesCards,
        onlyClientId: only(all.clients.items),
        onlyStoreId: only(all.stores.items),
      })),
    );
  }
}

function only(items: readonly { readonly id: string }[]): string | undefined {
  return items.length === 1 ? items[0]?.id : undefined;
}
