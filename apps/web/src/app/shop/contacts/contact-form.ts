import {
  ChangeDetectionStrategy,
  Component,
  inject,
  input,
  type OnInit,
  output,
} from '@angular/core';
import {
  type AbstractControl,
  NonNullableFormBuilder,
  ReactiveFormsModule,
  type ValidationErrors,
} from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { CheckField, type Choice, FormNotes, SelectField, TextField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';
import { type Contact, ContactsApi } from './contacts-api';
import { mailsWords } from './mails-words';

function addressForMails(form: AbstractControl): ValidationErrors | null {
  const { email, getsStatements, getsVisits } = form.value as Record<string, unknown>;
  return (getsStatements || getsVisits) && !email
    ? { address: 'Mails need an e-mail address.' }
    : null;
}

/** Adds a contact, or changes one, in the place where contacts are listed. */
@Component({
  selector: 'tw-contact-form',
  imports: [CheckField, FormNotes, MatButton, ReactiveFormsModule, SelectField, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
      <tw-form-notes [notes]="saving.notes()" />
      <tw-text-field label="Name" [control]="form.controls.name" />
      <div class="beside">
        <tw-text-field label="E-mail address" type="email" [control]="form.controls.email" />
        <tw-text-field label="Telephone" type="tel" [control]="form.controls.phone" />
      </div>
      @if (!contact()) {
        <tw-select-field
          label="For"
          none="Every store of the client"
          [options]="stores()"
          [control]="form.controls.storeId"
        />
      }
      <tw-check-field label="Gets the statements" [control]="form.controls.getsStatements" />
      <tw-check-field label="Gets word of each visit" [control]="form.controls.getsVisits" />
      @if (form.touched && form.errors?.['address']; as text) {
        <p class="alarm" role="alert">{{ text }}</p>
      }
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
          {{ contact() ? 'Save the contact' : 'Add the contact' }}
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
  styles: `
    .alarm {
      margin: 0;
      color: var(--tw-alarm);
    }
  `,
})
export class ContactForm implements OnInit {
  readonly #api = inject(ContactsApi);
  readonly #build = inject(NonNullableFormBuilder);
  readonly #messages = inject(Messages);

  readonly contact = input<Contact>();
  readonly clientId = input.required<string>();
  /** The store to begin with. */
  readonly storeId = input<string>();
  readonly stores = input<readonly Choice[]>([]);
  readonly saved = output<void>();
  readonly closed = output<void>();

  protected readonly form = this.#build.group(
    {
      name: ['', rulesFor('contacts.create', 'name')],
      email: ['', rulesFor('contacts.create', 'email')],
      phone: ['', rulesFor('contacts.create', 'phone')],
      getsStatements: [false],
      getsVisits: [false],
      storeId: [''],
    },
    { validators: addressForMails },
  );

  protected readonly saving: Submission<Contact> = submission(this.form, (key) => this.#send(key), {
    done: (contact) => {
      this.#messages.say(`${contact.name} gets ${mailsWords(contact)}.`);
      this.saved.emit();
    },
  });

  constructor() {
    inject(OpenForms).follow(this.form);
  }

  ngOnInit(): void {
    const contact = this.contact();
    this.form.reset({
      name: contact?.name ?? '',
      email: contact?.email ?? '',
      phone: contact?.phone ?? '',
      getsStatements: contact?.getsStatements ?? false,
      getsVisits: contact?.getsVisits ?? false,
      storeId: this.storeId() ?? '',
    });
  }

  #send(key: string) {
    const { storeId, email, phone, ...rest } = this.form.getRawValue();
    const body = { ...rest, email: email || null, phone: phone || null };
    const contact = this.contact();
    if (contact) return this.#api.change(contact, body);
    return this.#api.create({ ...body, clientId: this.clientId(), storeId: storeId || null }, key);
  }
}
