import { ChangeDetectionStrategy, Component, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  AmountField,
  ChoiceChips,
  FormNotes,
  LoadNote,
  PageHead,
  TextField,
  wordFor,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { submission, type Submission } from '../../core/forms/submission';
import { toldStale } from '../../core/forms/told-stale';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { CrewApi, type CrewMember, type CrewRole } from './crew-api';
import { crewRoles } from './crew-roles';

/** One of the crew: role, van, what an hour costs; and the end of the membership. */
@Component({
  selector: 'tw-crew-member',
  imports: [
    AmountField,
    ChoiceChips,
    FormNotes,
    LoadNote,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    TextField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (member.hasValue()) {
      @let shown = member.value();
      <tw-page-head [heading]="shown.name" [sub]="sub(shown)" upLink="/shop/crew" upLabel="Crew">
        @if (mayChange() && !shown.endedAt && !shown.you) {
          <button matButton="outlined" class="tw-destructive" type="button" (click)="end(shown)">
            End the membership
          </button>
        }
      </tw-page-head>
      <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="saving.submit()">
        <tw-form-notes [notes]="saving.notes()" />
        <tw-choices legend="Role" [choices]="roles" formControlName="role" />
        <div class="beside">
          <tw-text-field
            label="Initials"
            [control]="form.controls.initials"
            hint="For the day sheet"
          />
          <tw-text-field label="Van" [control]="form.controls.van" />
        </div>
        <tw-amount-field
          label="An hour costs us"
          [control]="form.controls.costPerHour"
          hint="For what our own mistakes cost. Only owners see it."
        />
        @if (mayChange() && !shown.endedAt) {
          <div class="actions">
            <button matButton="filled" type="submit" [disabled]="saving.busy()" disabledInteractive>
              Save
            </button>
            <a matButton="outlined" routerLink="/shop/crew">Cancel</a>
          </div>
        }
      </form>
    } @else {
      <tw-page-head heading="One of the crew" upLink="/shop/crew" upLabel="Crew" />
      <tw-load-note [of]="member" />
    }
  `,
})
export class CrewMemberPage implements HasChanges {
  readonly #api = inject(CrewApi);
  readonly #confirm = inject(Confirm);
  readonly #messages = inject(Messages);
  readonly #router = inject(Router);
  readonly #session = inject(Session);
  readonly #titles = inject(Titles);

  readonly membershipId = input.required<string>();

  protected readonly member = rxResource({
    params: () => this.membershipId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly roles = crewRoles;
  protected readonly form = inject(NonNullableFormBuilder).group({
    role: ['tech' as CrewRole],
    initials: ['', rulesFor('crew.change', 'initials')],
    van: ['', rulesFor('crew.change', 'van')],
    costPerHour: [null as number | null, rulesFor('crew.change', 'costPerHour')],
  });
  protected readonly saving: Submission<CrewMember> = submission(this.form, () => this.#send(), {
    done: (member) => {
      this.#messages.say(`${member.name} was changed.`);
      void this.#router.navigate(['/shop/crew']);
    },
    refused: (problem) => toldStale(problem, this.member, this.saving.notes),
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (!this.member.hasValue()) return;
      this.#titles.name(this.member.value().name);
      if (!this.form.dirty) this.form.reset(this.member.value());
    });
  }

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected mayChange(): boolean {
    return this.#session.mayChange('crew.manage');
  }

  protected sub({ email, role, endedAt }: CrewMember): string {
    return `${email} · ${endedAt ? `was ${wordFor(role)}, ended` : wordFor(role)}`;
  }

  protected async end(member: CrewMember): Promise<void> {
    const agreed = await this.#confirm.ask({
      heading: `End the membership of ${member.name}?`,
      consequence:
        `${member.name} is signed out of the shop at once, on every device. What was recorded ` +
        'stays. Only a new invitation brings the membership back.',
      action: 'End it',
      destructive: true,
    });
    if (!agreed) return;
    await firstValueFrom(this.#api.end(member));
    this.form.markAsPristine();
    this.#messages.say(`${member.name} is no longer of the crew.`);
    await this.#router.navigate(['/shop/crew']);
  }

  #send() {
    const { costPerHour, ...changed } = changedValues(this.form);
    const body = { ...changed, ...(costPerHour == null ? {} : { costPerHour }) };
    return this.#api.change(this.member.value() as CrewMember, body);
  }
}
