import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import {
  currencySign,
  InstantPipe,
  LabelPipe,
  ListShell,
  listState,
  LoadNote,
  MoneyText,
  PageHead,
  Reading,
  SectionHead,
  wordFor,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { type Column, RowsExport } from '../../core/lists/rows-export';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { ShowFilter, type Shown } from '../show-filter/show-filter';
import { CrewApi, type CrewMember, type CrewRole, type Invitation } from './crew-api';

const columns: readonly Column<CrewMember>[] = [
  { head: 'Name', text: ({ name }) => name },
  { head: 'Role', text: ({ role }) => wordFor(role) },
  { head: 'E-mail address', text: ({ email }) => email },
  { head: 'Initials', text: ({ initials }) => initials },
  { head: 'Van', text: ({ van }) => van },
  { head: 'An hour costs', amount: ({ costPerHour }) => costPerHour },
  { head: 'Ended', text: ({ endedAt }) => endedAt?.slice(0, 10) },
];

/** The shop's people, and who was invited to be one of them. */
@Component({
  selector: 'tw-crew-list',
  imports: [
    InstantPipe,
    LabelPipe,
    ListShell,
    LoadNote,
    MatButton,
    MatFormField,
    MatInput,
    MatLabel,
    MoneyText,
    PageHead,
    RouterLink,
    SectionHead,
    ShowFilter,
  ],
  templateUrl: './crew-list.html',
  styles: `
    .role {
      inline-size: 9rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CrewList {
  readonly #api = inject(CrewApi);
  readonly #exports = inject(RowsExport);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #session = inject(Session);

  protected readonly crew = listState((ask) => this.#api.list(ask), {
    sorts: { name: 'Name' },
    filters: filtersFromAddress({ role: '' as '' | CrewRole, show: '' as Shown }),
  });
  protected readonly sign = computed(() =>
    currencySign(this.#reading.currency(), this.#reading.locale()),
  );
  protected readonly manages = computed(() => this.#session.mayChange('crew.manage'));
  protected readonly seesCost = computed(() => this.#session.may('crew.manage'));
  protected readonly invitations = rxResource({
    params: () => (this.#session.may('crew.manage') ? {} : undefined),
    stream: () => this.#api.waitingInvitations(),
  });

  constructor() {
    keepInAddress(this.crew);
    reloadOn(this.crew, 'crew');
    reloadOn(this.invitations, 'crew', 'invitations');
  }

  protected chooseRole(event: Event): void {
    this.crew.filterBy('role', (event.target as HTMLSelectElement).value as '' | CrewRole);
  }

  protected save(): void {
    const { cursor: _cursor, ...ask } = this.crew.ask();
    void this.#exports.save({
      name: 'crew',
      one: 'person',
      many: 'people',
      columns,
      page: (asked) => this.#api.list({ ...ask, ...asked }),
    });
  }

  protected async inviteAgain(invitation: Invitation): Promise<void> {
    await firstValueFrom(this.#api.inviteAgain(invitation.id));
    this.invitations.reload();
    this.#messages.say(
      `The invitation was mailed to ${invitation.email} again. Its link works for 14 days.`,
    );
  }

  protected async withdraw(invitation: Invitation): Promise<void> {
    await firstValueFrom(this.#api.withdraw(invitation.id));
    this.invitations.reload();
    this.#messages.say(`The invitation of ${invitation.email} no longer works.`);
  }
}
