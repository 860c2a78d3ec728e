import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { ChoiceChips, FormNotes, PageHead, TextField, wordFor } from '@lib/ui';
import { rulesFor } from '../../core/forms/rules-for';
import { submission } from '../../core/forms/submission';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { CrewApi, type CrewRole } from './crew-api';
import { crewRoles } from './crew-roles';

@Component({
  selector: 'tw-crew-invite',
  imports: [
    ChoiceChips,
    FormNotes,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    TextField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Invite somebody"
      sub="They get a mail with a link that works for 14 days."
      upLink="/shop/crew"
      upLabel="Crew"
    />
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="sending.submit()">
      <tw-form-notes [notes]="sending.notes()" />
      <tw-choices legend="As" [choices]="roles" formControlName="role" />
      <tw-text-field label="Name" [control]="form.controls.name" />
      <tw-text-field label="E-mail address" type="email" [control]="form.controls.email" />
      <div class="actions">
        <button matButton="filled" type="submit" [disabled]="sending.busy()" disabledInteractive>
          Mail the invitation
        </button>
        <a matButton="outlined" routerLink="/shop/crew">Cancel</a>
      </div>
    </form>
  `,
})
export class CrewInvite implements HasChanges {
  readonly #api = inject(CrewApi);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);

  protected readonly roles = crewRoles;
  protected readonly form = inject(NonNullableFormBuilder).group({
    role: ['tech' as CrewRole],
    name: ['', rulesFor('invitations.send', 'name')],
    email: ['', rulesFor('invitations.send', 'email')],
  });
  protected readonly sending = submission(
    this.form,
    (key) => this.#api.invite(this.form.getRawValue(), key),
    {
      done: ({ email, role }) => {
        this.#messages.say(`${email} was invited as ${wordFor(role)}.`);
        void this.#router.navigate(['/shop/crew']);
      },
    },
  );

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }
}
