import { DOCUMENT } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { LoadNote, MoneyText, moneyText, problemText, Reading, SectionHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { planConsequence } from './plan-consequence';
import { type Plan, type Subscription, SubscriptionApi } from './subscription-api';

/** The plans on offer, and the way to one: through the card page when nothing is paid yet. */
@Component({
  selector: 'tw-plan-table',
  imports: [LoadNote, MatButton, MoneyText, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Plans" sub="Every plan has every part of the product." />
    @if (plans.hasValue()) {
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Plan</th>
            <th scope="col" class="num">A month</th>
            <th scope="col" class="num">Stores</th>
            <th scope="col" class="num">Machines</th>
            <th scope="col" class="num">Crew</th>
            <th scope="col"><span class="tw-unseen">Choose</span></th>
          </tr>
        </thead>
        <tbody>
          @for (plan of plans.value(); track plan.id) {
            <tr [class.chosen]="plan.id === subscription().plan.id">
              <th scope="row">{{ plan.name }}</th>
              <td class="num" data-label="A month">
                <tw-money [amount]="plan.monthlyAmount" [currency]="plan.currency" />
              </td>
              <td class="num" data-label="Stores">
                {{ plan.storeLimit.toLocaleString(locale()) }}
              </td>
              <td class="num" data-label="Machines">
                {{ plan.machineLimit.toLocaleString(locale()) }}
              </td>
              <td class="num" data-label="Crew">{{ plan.crewLimit.toLocaleString(locale()) }}</td>
              <td class="tw-acts">
                @if (plan.id === subscription().plan.id && settled()) {
                  <span class="tw-soft">your plan</span>
                } @else if (mayChoose() && !subscription().pausedByPlatform) {
                  <button
                    matButton="outlined"
                    type="button"
                    [disabled]="busy()"
                    disabledInteractive
                    (click)="choose(plan)"
                  >
                    {{ plan.id === subscription().plan.id ? 'Pay for' : 'Choose' }}
                    {{ plan.name }}
                  </button>
                }
              </td>
            </tr>
          }
        </tbody>
      </table>
    } @else {
      <tw-load-note [of]="plans" />
    }
    @if (!mayChoose()) {
      <p class="tw-soft">The shop’s owner chooses the plan.</p>
    }
  `,
})
export class PlanTable {
  readonly #api = inject(SubscriptionApi);
  readonly #confirm = inject(Confirm);
  readonly #document = inject(DOCUMENT);
  readonly #messages = inject(Messages);
  readonly #session = inject(Session);

  readonly subscription = input.required<Subscription>();
  readonly changed = output<Subscription>();

  protected readonly locale = inject(Reading).locale;
  protected readonly plans = rxResource({ stream: () => this.#api.plans() });
  protected readonly busy = signal(false);
  /** Choosing a plan is what opens a paused shop, so being paused does not forbid it. */
  protected readonly mayChoose = computed(() => this.#session.may('subscription.change'));
  /** Nothing has to be paid for the plan the shop is on. */
  protected readonly settled = computed(() => this.subscription().state === 'active');

  protected async choose(plan: Plan): Promise<void> {
    if (this.busy()) return;
    const agreed = await this.#confirm.ask({
      heading: `Choose ${plan.name}?`,
      consequence: planConsequence(this.subscription(), plan, (amount) =>
        moneyText(amount, plan.currency, this.locale()),
      ),
      action: `Choose ${plan.name}`,
    });
    if (!agreed) return;
    this.busy.set(true);
    try {
      const { url, subscription } = await firstValueFrom(this.#api.choose(plan.id));
      if (url) {
        this.#document.location.assign(url);
        return;
      }
      this.#messages.say(`You are on ${plan.name} now.`);
      this.changed.emit(subscription);
    } catch (problem) {
      this.#messages.say(problemText(problem));
    }
    this.busy.set(false);
  }
}
