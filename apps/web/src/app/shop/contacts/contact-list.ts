import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { ListShell, listState, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { ListExport } from '../exports/list-export';
import { ShowFilter, type Shown } from '../show-filter/show-filter';
import { ContactsApi } from './contacts-api';
import { mailsWords } from './mails-words';

/** Everybody at every client; they are added and changed on the page of their client or store. */
@Component({
  selector: 'tw-contact-list',
  imports: [ListShell, MatButton, PageHead, RouterLink, ShowFilter],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Contacts"
      sub="The people at your clients, and which mails they get."
      upLink="/shop/clients"
      upLabel="Clients"
    />
    <tw-list-shell
      [list]="contacts"
      searchLabel="Search contacts"
      empty="People noted on the page of a client or a store are listed here."
      [csv]="session.may('exports.read')"
      (csvAsked)="exports.save('contacts')"
    >
      <tw-show-filter filters [list]="contacts" />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Name</th>
            <th scope="col">Client</th>
            <th scope="col">For</th>
            <th scope="col">Reached at</th>
            <th scope="col">Gets</th>
          </tr>
        </thead>
        <tbody>
          @for (contact of contacts.items(); track contact.id) {
            <tr>
              <th scope="row">{{ contact.name }}</th>
              <td data-label="Client">
                <a [routerLink]="['/shop/clients', contact.client.id]">{{ contact.client.name }}</a>
              </td>
              <td data-label="For">
                @if (contact.store; as store) {
                  <a [routerLink]="['/shop/stores', store.id]">{{ store.name }}</a>
                } @else {
                  every store
                }
              </td>
              <td data-label="Reached at">
                <span>
                  @if (contact.email) {
                    <a href="mailto:{{ contact.email }}">{{ contact.email }}</a><br />
                  }
                  @if (contact.phone) {
                    <a href="tel:{{ contact.phone }}">{{ contact.phone }}</a>
                  }
                </span>
              </td>
              <td data-label="Gets">{{ mailsWords(contact) }}</td>
            </tr>
          }
        </tbody>
      </table>
      <a emptyAction matButton="filled" routerLink="/shop/clients">Go to the clients</a>
    </tw-list-shell>
  `,
})
export class ContactList {
  readonly #api = inject(ContactsApi);
  protected readonly session = inject(Session);
  protected readonly exports = inject(ListExport);
  protected readonly mailsWords = mailsWords;

  protected readonly contacts = listState((ask) => this.#api.list(ask), {
    sorts: { name: 'Name' },
    filters: filtersFromAddress({ show: '' as Shown }),
  });

  constructor() {
    keepInAddress(this.contacts);
    reloadOn(this.contacts, 'contacts');
  }
}
