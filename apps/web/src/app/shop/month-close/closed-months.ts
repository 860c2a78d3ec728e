import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { InstantPipe, ListShell, listState, MoneyText, MonthPipe, SectionHead } from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { moneySign } from '../money/money-sign';
import { MonthCloseApi } from './month-close-api';
import { runStateWords } from './run-words';

/** The months closed so far. */
@Component({
  selector: 'tw-closed-months',
  imports: [InstantPipe, ListShell, MoneyText, MonthPipe, RouterLink, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Months closed" />
    <tw-list-shell
      [list]="runs"
      [searchable]="false"
      empty="Months you close appear here, with what was stated."
    >
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Month</th>
            <th scope="col">How it stands</th>
            <th scope="col">Begun</th>
            <th scope="col">By</th>
            <th scope="col" class="num">Statements</th>
            <th scope="col" class="num">Charged, {{ sign() }}</th>
          </tr>
        </thead>
        <tbody>
          @for (run of runs.items(); track run.id) {
            <tr>
              <th scope="row">
                <a routerLink="/shop/month-close" [queryParams]="{ month: run.month }">
                  {{ run.month | twMonth }}
                </a>
              </th>
              <td data-label="How it stands">
                <span [class.alarm]="run.state === 'failed' || run.state === 'held'">{{
                  runStateWords(run)
                }}</span>
              </td>
              <td data-label="Begun">{{ run.startedAt | twInstant }}</td>
              <td data-label="By">{{ run.startedBy ?? 'the schedule' }}</td>
              <td class="num" data-label="Statements">
                <a routerLink="/shop/statements" [queryParams]="{ month: run.month }">
                  {{ run.stores }}
                </a>
              </td>
              <td class="num" [attr.data-label]="'Charged, ' + sign()">
                <tw-money [amount]="run.total" bare />
              </td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
})
export class ClosedMonths {
  readonly #api = inject(MonthCloseApi);

  protected readonly sign = moneySign();
  protected readonly runStateWords = runStateWords;
  protected readonly runs = listState((ask) => this.#api.runs(ask), {
    sorts: { '-month': 'Newest first' },
  });

  constructor() {
    reloadOn(this.runs, 'statement-run');
  }
}
