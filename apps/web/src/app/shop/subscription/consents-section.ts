import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import {
  type Choice,
  FormNotes,
  InstantPipe,
  instantText,
  LoadNote,
  problemText,
  Reading,
  SectionHead,
  SelectField,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { OpenForms } from '../../core/forms/open-forms';
import { submission } from '../../core/forms/submission';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { type Consent, SubscriptionApi } from './subscription-api';

const spans: readonly Choice[] = [
  { value: '1', label: 'One hour' },
  { value: '4', label: 'Four hours' },
  { value: '24', label: 'One day' },
  { value: '72', label: 'Three days' },
  { value: '168', label: 'One week' },
];

/** Support reads the shop's data only while the owner lets it, and for a time that ends by itself. */
@Component({
  selector: 'tw-consents-section',
  imports: [
    FormNotes,
    InstantPipe,
    LoadNote,
    MatButton,
    ReactiveFormsModule,
    SectionHead,
    SelectField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head
      heading="Support"
      sub="The platform’s people cannot see your business data, except while you let them."
    />
    @if (mayGive()) {
      <form class="let" [formGroup]="form" (ngSubmit)="giving.submit()">
        <tw-form-notes [notes]="giving.notes()" />
        <tw-select-field
          label="Let support read for"
          [options]="spans"
          [control]="form.controls.hours"
        />
        <button matButton="outlined" type="submit" [disabled]="giving.busy()" disabledInteractive>
          Let support in
        </button>
      </form>
    }
    @if (consents.hasValue()) {
      @if (consents.value().length) {
        <table class="tw-table">
          <thead>
            <tr>
              <th scope="col">Given by</th>
              <th scope="col">From</th>
              <th scope="col">Until</th>
              <th scope="col"><span class="tw-unseen">Take back</span></th>
            </tr>
          </thead>
          <tbody>
            @for (consent of consents.value(); track consent.id) {
              <tr [class.chosen]="consent.inForce">
                <th scope="row">{{ consent.givenByName }}</th>
                <td data-label="From">{{ consent.createdAt | twInstant }}</td>
                <td data-label="Until">
                  @if (consent.withdrawnAt; as at) {
                    taken back {{ at | twInstant }}
                  } @else {
                    {{ consent.until | twInstant }}
                  }
                </td>
                <td class="tw-acts">
                  @if (consent.inForce && mayGive()) {
                    <button matButton type="button" (click)="withdraw(consent)">
                      Take back<span class="tw-unseen"> what {{ consent.givenByName }} gave</span>
                    </button>
                  }
                </td>
              </tr>
            }
          </tbody>
        </table>
      } @else {
        <p class="tw-soft">Support was never let in.</p>
      }
    } @else {
      <tw-load-note [of]="consents" />
    }
  `,
  styles: `
    .let {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0.75rem;
      margin-block-end: 1rem;
    }
    tw-select-field {
      flex: 0 1 14rem;
    }
    tw-form-notes {
      flex: 1 0 100%;
    }
  `,
})
export class ConsentsSection {
  readonly #api = inject(SubscriptionApi);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #session = inject(Session);

  protected readonly spans = spans;
  protected readonly mayGive = computed(() => this.#session.may('subscription.change'));
  protected readonly consents = rxResource({ stream: () => this.#api.consents() });
  protected readonly form = inject(NonNullableFormBuilder).group({ hours: ['4'] });
  protected readonly giving = submission(
    this.form,
    (key) => this.#api.giveConsent(Number(this.form.getRawValue().hours), key),
    { done: (consent) => this.#given(consent) },
  );

  constructor() {
    inject(OpenForms).follow(this.form);
  }

  #given(consent: Consent): void {
    this.consents.reload();
    const until = instantText(consent.until, this.#reading.locale(), this.#reading.zone());
    this.#messages.say(`Support can read this shop until ${until}. It changes nothing.`);
  }

  protected async withdraw(consent: Consent): Promise<void> {
    try {
      await firstValueFrom(this.#api.withdrawConsent(consent.id));
      this.#messages.say('Support sees nothing of this shop any more.');
    } catch (problem) {
      this.#messages.say(problemText(problem));
    }
    this.consents.reload();
  }
}
