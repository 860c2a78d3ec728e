import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import {
  Callout,
  dayIn,
  dayText,
  InstantPipe,
  LoadNote,
  PageHead,
  problemText,
  Reading,
  SectionHead,
  wordFor,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { ConsentsSection } from './consents-section';
import { PlanTable } from './plan-table';
import { eventWords, standingWords } from './standing-words';
import { SubscriptionApi } from './subscription-api';
import { UsageLine } from './usage-line';

/** What the shop pays the platform for, what it uses of it, and whom it lets see its data. */
@Component({
  selector: 'tw-subscription-page',
  imports: [
    Callout,
    ConsentsSection,
    InstantPipe,
    LoadNote,
    MatButton,
    PageHead,
    PlanTable,
    RouterLink,
    SectionHead,
    UsageLine,
  ],
  providers: [OpenForms],
  templateUrl: './subscription-page.html',
  styles: `
    tw-callout {
      max-inline-size: 46rem;
    }
    .usage {
      display: grid;
      gap: 1rem;
      max-inline-size: 36rem;
    }
    .tw-facts {
      grid-template-columns: minmax(6rem, max-content) minmax(0, 1fr);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SubscriptionPage implements HasChanges {
  readonly #api = inject(SubscriptionApi);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #route = inject(ActivatedRoute);
  readonly #router = inject(Router);
  protected readonly session = inject(Session);

  /** Of the address, when the browser comes back from the card page. */
  readonly paid = input<string>();
  readonly cancelled = input<string>();

  protected readonly eventWords = eventWords;
  protected readonly subscription = rxResource({ stream: () => this.#api.show() });
  protected readonly sub = computed(() => {
    if (!this.subscription.hasValue()) return '';
    const { plan, state } = this.subscription.value();
    return `${plan.name}, ${wordFor(state)}`;
  });
  protected readonly standing = computed(() =>
    this.subscription.hasValue()
      ? standingWords(this.subscription.value(), (instant) =>
          dayText(dayIn(this.#reading.zone(), new Date(instant)), this.#reading.locale()),
        )
      : undefined,
  );

  constructor() {
    afterNextRender(() => void this.#comeBack());
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  /** The browser may be back before the card payment service's word is: so it is asked. */
  async #comeBack(): Promise<void> {
    if (!this.paid() && !this.cancelled()) return;
    try {
      if (this.paid()) {
        const subscription = await firstValueFrom(this.#api.check());
        this.subscription.set(subscription);
        // What the shop may do is part of the session.
        await this.session.renew(this.session.token());
        this.#messages.say(
          subscription.state === 'active'
            ? `${subscription.plan.name} is paid. Thank you.`
            : 'The payment is not confirmed yet. It shows here as soon as it is.',
        );
      } else {
        this.#messages.say('You turned back before paying. Nothing was changed.');
      }
    } catch (problem) {
      this.#messages.say(problemText(problem));
    }
    await this.#router.navigate([], { relativeTo: this.#route, replaceUrl: true });
  }
}
