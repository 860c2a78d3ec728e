import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { DayPipe, MoneyText, SectionHead } from '@lib/ui';
import { moneySign } from '../money/money-sign';
import { type Statement } from './statements-api';

/** What stands on a statement beside visits: fees, late charges, credits and payments. */
@Component({
  selector: 'tw-other-lines',
  imports: [DayPipe, MoneyText, RouterLink, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (lines().length) {
      <tw-section-head heading="Besides visits" />
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Day</th>
            <th scope="col">What</th>
            <th scope="col">Reference</th>
            <th scope="col" class="num">With tax, {{ sign() }}</th>
          </tr>
        </thead>
        <tbody>
          @for (line of lines(); track line.id) {
            <tr>
              <td data-label="Day">{{ line.date | twDay }}</td>
              <th scope="row">{{ line.words }}</th>
              <td data-label="Reference" class="tw-figures">
                @if (line.kind === 'payment') {
                  <a [routerLink]="['/shop/payments', line.id]">{{ line.reference }}</a>
                } @else {
                  {{ line.reference }}
                }
              </td>
              <td class="num" [attr.data-label]="'With tax, ' + sign()">
                <tw-money bare [amount]="line.total" [currency]="statement().currency" />
              </td>
            </tr>
          }
        </tbody>
      </table>
    }
  `,
})
export class OtherLines {
  readonly statement = input.required<Statement>();

  protected readonly sign = moneySign();
  protected readonly lines = computed(() =>
    this.statement().lines.filter(({ kind }) => kind !== 'ticket'),
  );
}
