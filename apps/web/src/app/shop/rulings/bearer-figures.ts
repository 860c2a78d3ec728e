import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type Bearer } from '@lib/contracts/web';
import { BearerLabel, currencySign, MoneyText, Reading } from '@lib/ui';
import { type RulingGroup } from './ruling-groups';

/** What it means in figures if the one or the other bears it. */
@Component({
  selector: 'tw-bearer-figures',
  imports: [BearerLabel, MoneyText],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <table class="tw-table tw-table-kept">
      <caption>
        Who bears it
      </caption>
      <thead>
        <tr>
          <th scope="col"><span class="tw-unseen">Bearer</span></th>
          <th scope="col" class="num">Charged, {{ sign() }}</th>
          <th scope="col" class="num">Our cost, {{ sign() }}</th>
          @if (claims()) {
            <th scope="col" class="num">Claimed, {{ sign() }}</th>
          }
        </tr>
      </thead>
      <tbody>
        @for (outcome of group().outcomes; track outcome.bearer) {
          <tr [class.chosen]="outcome.bearer === held()">
            <th scope="row">
              <tw-bearer [bearer]="outcome.bearer" />
              @if (outcome.bearer === held()) {
                <span class="tw-unseen">{{ group().decision ? 'decided' : 'proposed' }}</span>
              }
            </th>
            <td class="num">
              <tw-money bare [currency]="currency()" [amount]="outcome.charged" />
            </td>
            <td class="num">
              <tw-money bare [currency]="currency()" [amount]="outcome.ourCost" />
            </td>
            @if (claims()) {
              <td class="num">
                <tw-money bare [currency]="currency()" [amount]="outcome.claimed" />
              </td>
            }
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    :host {
      display: block;
    }
    thead th {
      white-space: normal;
    }
    @media (max-width: 22rem) {
      table {
        font-size: 0.8125rem;
      }
    }
    @media (max-width: 30rem) {
      th,
      td {
        padding-inline: 0.25rem;
      }
    }
  `,
})
export class BearerFigures {
  readonly #reading = inject(Reading);
  readonly group = input.required<RulingGroup>();
  readonly currency = input.required<string>();

  protected readonly held = computed<Bearer>(() => this.group().bearer ?? this.group().proposed);
  protected readonly claims = computed(() =>
    this.group().outcomes.some(({ claimed }) => claimed !== 0),
  );
  protected readonly sign = computed(() => currencySign(this.currency(), this.#reading.locale()));
}
