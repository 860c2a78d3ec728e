import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { type Choice, ListShell, listState, SectionHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { ShowFilter, type Shown } from '../show-filter/show-filter';
import { ContactForm } from './contact-form';
import { type Contact, ContactsApi } from './contacts-api';
import { mailsWords } from './mails-words';

/** The people at a client or a store, and which mails they get. */
@Component({
  selector: 'tw-contacts-section',
  imports: [ContactForm, ListShell, MatButton, SectionHead, ShowFilter],
  templateUrl: './contacts-section.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ContactsSection {
  readonly #api = inject(ContactsApi);
  readonly #messages = inject(Messages);
  protected readonly session = inject(Session);
  protected readonly mailsWords = mailsWords;

  readonly clientId = input.required<string>();
  /** Only those of this store, and those for every store of its client. */
  readonly storeId = input<string>();
  /** The stores a new contact can be for. */
  readonly stores = input<readonly Choice[]>([]);

  protected readonly contacts = listState(
    (ask) =>
      this.#api.list({ ...ask, clientId: this.clientId(), storeId: this.storeId() || undefined }),
    { sorts: { name: 'Name' }, filters: { show: '' as Shown } },
  );
  /** The id of the contact whose form stands open; `new` for one to be added. */
  protected readonly open = signal<string | undefined>(undefined);
  protected readonly mayChange = computed(() => this.session.mayChange('clients.change'));

  constructor() {
    reloadOn(this.contacts, 'contacts');
  }

  protected place(contact: Contact): string {
    return contact.store?.name ?? 'every store';
  }

  protected saved(): void {
    this.open.set(undefined);
    this.contacts.reload();
  }

  protected async end(contact: Contact): Promise<void> {
    const ended = await firstValueFrom(this.#api.end(contact));
    this.contacts.reload();
    this.#messages.say(`${contact.name} gets no more mails.`, {
      label: 'Undo',
      run: () => void this.resume(ended),
    });
  }

  protected async resume(contact: Contact): Promise<void> {
    const resumed = await firstValueFrom(this.#api.resume(contact));
    this.contacts.reload();
    this.#messages.say(`${contact.name} gets ${mailsWords(resumed)} again.`);
  }
}
