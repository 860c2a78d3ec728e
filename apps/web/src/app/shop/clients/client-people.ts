import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { type Choice, InstantPipe, LabelPipe, LoadNote, SectionHead, wordFor } from '@lib/ui';
import { firstValueFrom, forkJoin, map } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { type ClientPerson, ClientsApi, type Invitation } from './clients-api';
import { InviteForm } from './invite-form';

/** Who of a client signs in here, and who was invited to. */
@Component({
  selector: 'tw-client-people',
  imports: [InstantPipe, InviteForm, LabelPipe, LoadNote, MatButton, SectionHead],
  templateUrl: './client-people.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClientPeople {
  readonly #api = inject(ClientsApi);
  readonly #confirm = inject(Confirm);
  readonly #messages = inject(Messages);
  readonly #session = inject(Session);

  readonly clientId = input.required<string>();
  readonly clientName = input.required<string>();
  readonly stores = input<readonly Choice[]>([]);

  protected readonly everybody = rxResource({
    params: () => ({ clientId: this.clientId() }),
    stream: ({ params }) =>
      forkJoin([
        this.#api.people({ ...params, limit: 100 }),
        this.#api.invitations({ ...params, limit: 100 }),
      ]).pipe(
        map(([people, invitations]) => ({
          people: people.items,
          invitations: invitations.items.filter(({ state }) => waits(state)),
        })),
      ),
  });
  protected readonly inviting = signal(false);
  protected readonly mayChange = computed(() => this.#session.mayChange('invitations.manage'));

  constructor() {
    reloadOn(this.everybody, 'crew', 'invitations');
  }

  protected storeOf(storeId: string | null): string {
    return this.stores().find(({ value }) => value === storeId)?.label ?? 'every store';
  }

  protected invited(invitation: Invitation): void {
    this.inviting.set(false);
    this.everybody.reload();
    this.#messages.say(
      `An invitation was mailed to ${invitation.email}. Its link works for 14 days.`,
    );
  }

  protected async inviteAgain(invitation: Invitation): Promise<void> {
    this.invited(await firstValueFrom(this.#api.inviteAgain(invitation.id)));
  }

  protected async withdraw(invitation: Invitation): Promise<void> {
    await firstValueFrom(this.#api.withdraw(invitation.id));
    this.everybody.reload();
    this.#messages.say(`The invitation of ${invitation.email} no longer works.`);
  }

  protected async end(person: ClientPerson): Promise<void> {
    const agreed = await this.#confirm.ask({
      heading: `End what ${person.name} can see?`,
      consequence:
        `${person.name} is ${wordFor(person.role)} at ${person.storeName ?? this.clientName()} ` +
        'and will see nothing of it here any more. Only a new invitation brings that back.',
      action: 'End it',
      destructive: true,
    });
    if (!agreed) return;
    await firstValueFrom(this.#api.endPerson(person));
    this.everybody.reload();
    this.#messages.say(`${person.name} sees nothing of ${this.clientName()} any more.`);
  }
}

function waits(state: Invitation['state']): boolean {
  return state === 'open' || state === 'run_out';
}
