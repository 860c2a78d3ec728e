import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  type Choice,
  counted,
  ListShell,
  listState,
  LoadNote,
  PageHead,
  SectionHead,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { ContactsSection } from '../contacts/contacts-section';
import { ShowFilter, type Shown } from '../show-filter/show-filter';
import { StoreTable } from '../stores/store-table';
import { StoresApi } from '../stores/stores-api';
import { ClientFacts } from './client-facts';
import { ClientPeople } from './client-people';
import { type Client, ClientsApi } from './clients-api';

@Component({
  selector: 'tw-client-page',
  imports: [
    ClientFacts,
    ClientPeople,
    ContactsSection,
    ListShell,
    LoadNote,
    MatButton,
    PageHead,
    RouterLink,
    SectionHead,
    ShowFilter,
    StoreTable,
  ],
  providers: [OpenForms],
  templateUrl: './client-page.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClientPage implements HasChanges {
  readonly #api = inject(ClientsApi);
  readonly #confirm = inject(Confirm);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #storesApi = inject(StoresApi);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);

  readonly clientId = input.required<string>();

  protected readonly client = rxResource({
    params: () => this.clientId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly stores = listState(
    (ask) => this.#storesApi.list({ ...ask, clientId: this.clientId() }),
    { sorts: { name: 'Name', number: 'Number' }, filters: { show: '' as Shown } },
  );
  /** For forms that ask which store; a client with more of them has them by search. */
  readonly #allStores = rxResource({
    params: () => this.clientId(),
    stream: ({ params }) => this.#storesApi.list({ clientId: params, limit: 100 }),
  });
  protected readonly storeChoices = computed<readonly Choice[]>(() =>
    this.#allStores.hasValue()
      ? this.#allStores.value().items.map(({ id, name }) => ({ value: id, label: name }))
      : [],
  );
  protected readonly mayChange = computed(() => this.session.mayChange('clients.change'));

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    reloadOn(this.client, 'clients', 'stores', 'machines');
    reloadOn(this.stores, 'stores', 'machines');
    reloadOn(this.#allStores, 'stores');
    effect(() => {
      if (this.client.hasValue()) this.#titles.name(this.client.value().name);
    });
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  protected sub(client: Client): string {
    const notUp = client.machinesNotUp ? [`${client.machinesNotUp} of them not up`] : [];
    const ended = client.endedAt ? ['ended'] : [];
    return [
      client.number,
      counted(client.stores, 'store'),
      counted(client.machines, 'machine'),
      ...notUp,
      ...ended,
    ].join(' · ');
  }

  protected async end(client: Client): Promise<void> {
    const agreed = await this.#confirm.ask({
      heading: `Stop working for ${client.name}?`,
      consequence:
        `${counted(client.stores, 'store')} with ${counted(client.machines, 'machine')} end with ` +
        'it. Nothing is lost: history and statements stay, and the client can be resumed.',
      action: 'Stop working for it',
      destructive: true,
    });
    if (!agreed) return;
    this.client.set(await firstValueFrom(this.#api.end(client)));
    this.stores.reload();
    this.#messages.say(`${client.name} has ended, with its stores.`);
  }

  protected async resume(client: Client): Promise<void> {
    this.client.set(await firstValueFrom(this.#api.resume(client)));
    this.#messages.say(`${client.name} is a client again. Resume its stores one by one.`);
  }
}
