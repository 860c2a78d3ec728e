import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { EmptyNote, LoadNote, MoneyText, PageHead, Reading } from '@lib/ui';
import { Session } from '../../core/session/session';
import { PlatformApi } from '../platform-api';

/** What shops can choose to pay for. They are few, so they stand on one page. */
@Component({
  selector: 'tw-plan-list',
  imports: [EmptyNote, LoadNote, MatButton, MoneyText, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Plans" sub="What shops can choose to pay for">
      @if (session.may('platform.change')) {
        <a matButton="filled" routerLink="new">Add a plan</a>
      }
    </tw-page-head>
    @if (plans.hasValue()) {
      @if (plans.value().items.length > 0) {
        <table class="tw-table">
          <thead>
            <tr>
              <th scope="col">Plan</th>
              <th scope="col" class="num">A month</th>
              <th scope="col" class="num">Stores</th>
              <th scope="col" class="num">Machines</th>
              <th scope="col" class="num">Crew</th>
              <th scope="col" class="num">Trial</th>
              <th scope="col" class="num">Grace</th>
              <th scope="col" class="num">Shops on it</th>
            </tr>
          </thead>
          <tbody>
            @for (plan of plans.value().items; track plan.id) {
              <tr>
                <th scope="row">
                  <a [routerLink]="[plan.id, 'change']">{{ plan.name }}</a>
                  @if (!plan.offered) {
                    <span class="tw-soft"> not on offer</span>
                  }
                </th>
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
                <td class="num" data-label="Trial">{{ plan.trialDays }} days</td>
                <td class="num" data-label="Grace">{{ plan.graceDays }} days</td>
                <td class="num" data-label="Shops on it">
                  {{ plan.shops.toLocaleString(locale()) }}
                </td>
              </tr>
            }
          </tbody>
        </table>
      } @else {
        <tw-empty text="Without a plan on offer nobody can open a shop.">
          <a matButton="filled" routerLink="new">Add a plan</a>
        </tw-empty>
      }
    } @else {
      <tw-load-note [of]="plans" />
    }
  `,
})
export class PlanList {
  readonly #api = inject(PlatformApi);
  protected readonly session = inject(Session);
  protected readonly locale = inject(Reading).locale;

  protected readonly plans = rxResource({ stream: () => this.#api.plans() });
}
