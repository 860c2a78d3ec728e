import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { type Choice, ChoiceChips, FormNotes, SelectField, TextField } from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { ClientsApi, type Invitation } from './clients-api';

const roles: readonly Choice[] = [
  { value: 'client_owner', label: 'Owner: every store, with money' },
  { value: 'attendant', label: 'Attendant: one store, without money' },
];

/** Invites the owner or an attendant of a client by mail. */
@Component({
  selector: 'tw-invite-form',
  imports: [ChoiceChips, FormNotes, MatButton, ReactiveFormsModule, SelectField, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="sending.submit()">
      <tw-form-notes [notes]="sending.notes()" />
      <tw-choices legend="As" [choices]="roles" formControlName="role" />
      @if (role() === 'attendant') {
        <tw-select-field
          label="Works in"
          none="Choose the store"
          [options]="stores()"
          [control]="form.controls.storeId"
        />
      }
      <tw-text-field label="Name" [control]="form.controls.name" />
      <tw-text-field label="E-mail address" type="email" [control]="form.controls.email" />
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="sending.busy()" disabledInteractive>
          Mail the invitation
        </button>
        <button matButton="outlined" type="button" (click)="closed.emit()">Cancel</button>
      </div>
    </form>
  `,
})
export class InviteForm {
  readonly #api = inject(ClientsApi);
  readonly #build = inject(NonNullableFormBuilder);

  readonly clientId = input.required<string>();
  readonly stores = input<readonly Choice[]>([]);
  readonly sent = output<Invitation>();
  readonly closed = output<void>();

  protected readonly roles = roles;
  protected readonly form = this.#build.group({
    role: ['client_owner' as 'client_owner' | 'attendant'],
    storeId: [''],
    name: ['', rulesFor('invitations.send', 'name')],
    email: ['', rulesFor('invitations.send', 'email')],
  });
  protected readonly role = toSignal(this.form.controls.role.valueChanges, {
    initialValue: this.form.controls.role.value,
  });

  protected readonly sending = submission(this.form, (key) => this.#send(key), {
    done: (invitation) => this.sent.emit(invitation),
  });

  constructor() {
    inject(OpenForms).follow(this.form);
    // An attendant works in one store; it is asked for only then.
    const { role, storeId } = this.form.controls;
    storeId.addValidators((control) =>
      role.value === 'attendant' ? Validators.required(control) : null,
    );
    role.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => storeId.updateValueAndValidity());
  }

  #send(key: string) {
    const { storeId, ...rest } = this.form.getRawValue();
    const attendant = rest.role === 'attendant';
    return this.#api.invite(
      { ...rest, clientId: this.clientId(), ...(attendant ? { storeId } : {}) },
      key,
    );
  }
}
