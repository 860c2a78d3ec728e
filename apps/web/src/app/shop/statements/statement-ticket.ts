import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { counted, DayPipe, MoneyText, moneyText, MonthPipe, Reading, TicketCard } from '@lib/ui';
import { type Statement } from './statements-api';

/** The statement as a ticket: whose, which, until when and how much on the stub; why beside it. */
@Component({
  selector: 'tw-statement-ticket',
  imports: [DayPipe, MoneyText, MonthPipe, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @let shown = statement();
    <tw-ticket copy="white" wide [alarmed]="shown.state === 'overdue'">
      <div stub class="stub">
        <span class="tw-soft">Statement</span>
        <strong class="number tw-figures">{{ shown.name }}</strong>
        <span>{{ shown.month | twMonth }}</span>
        <span class="tw-soft">issued {{ shown.issuedOn | twDay }}</span>
        <span [class.alarm]="shown.state === 'overdue'"> due {{ shown.dueOn | twDay }} </span>
        <tw-money class="amount" [amount]="shown.closing" [currency]="shown.currency" />
        <span [class.alarm]="shown.state === 'overdue'">{{ standsWords() }}</span>
      </div>
      <p class="head">{{ headWords() }}</p>
      <table class="tw-table tw-table-kept">
        <caption class="tw-unseen">
          How the balance came about
        </caption>
        <tbody>
          <tr>
            <th scope="row">Opening</th>
            <td class="num"><tw-money [amount]="shown.opening" [currency]="shown.currency" /></td>
          </tr>
          <tr>
            <th scope="row">Charged</th>
            <td class="num"><tw-money [amount]="shown.charged" [currency]="shown.currency" /></td>
          </tr>
          <tr>
            <th scope="row">Tax</th>
            <td class="num"><tw-money [amount]="shown.tax" [currency]="shown.currency" /></td>
          </tr>
          @if (shown.sums.credited) {
            <tr>
              <th scope="row">Credited</th>
              <td class="num">
                <tw-money [amount]="-shown.sums.credited" [currency]="shown.currency" />
              </td>
            </tr>
          }
          <tr>
            <th scope="row">Paid</th>
            <td class="num"><tw-money [amount]="-shown.paid" [currency]="shown.currency" /></td>
          </tr>
        </tbody>
        <tfoot>
          <tr>
            <th scope="row">Closing</th>
            <td class="num"><tw-money [amount]="shown.closing" [currency]="shown.currency" /></td>
          </tr>
        </tfoot>
      </table>
      <p class="below">
        @if (shown.borneByShop) {
          Borne by {{ shown.shopName }}:
          <tw-money [amount]="shown.borneByShop" [currency]="shown.currency" />. It is not charged.
        }
        To be paid with reference <span class="tw-figures">{{ shown.reference }}</span>.
      </p>
    </tw-ticket>
  `,
  styles: `
    :host {
      display: block;
      max-inline-size: 46rem;
    }
    .stub {
      display: flex;
      flex-wrap: wrap;
      flex-direction: column;
      gap: 0.125rem 0.75rem;
    }
    .number {
      font-size: 1.125rem;
    }
    .amount {
      margin-block-start: 0.75rem;
      font-size: 1.375rem;
      font-weight: 600;
      text-align: start;
    }
    .head {
      margin: 0 0 0.5rem;
      font-weight: 600;
    }
    .below {
      margin: 0.75rem 0 0;
      font-size: 0.9375rem;
    }
    .alarm {
      color: var(--tw-alarm);
    }
    th {
      font-weight: 400;
    }
  `,
})
export class StatementTicket {
  readonly #reading = inject(Reading);

  readonly statement = input.required<Statement>();

  protected readonly headWords = computed(() => {
    const { visits } = this.statement();
    if (!visits.length) return 'No visits this month';
    const machines = new Set(visits.flatMap(({ jobs }) => jobs.map((job) => job.machineId)));
    return `${counted(visits.length, 'visit')}, ${counted(machines.size, 'machine')} worked on`;
  });
  protected readonly standsWords = computed(() => {
    const { state, toPay, closing, currency } = this.statement();
    if (state === 'paid') return 'paid';
    if (toPay <= 0) return 'nothing to pay';
    if (toPay === closing) return state;
    // Something was paid since, or came due before it.
    return `${state}, ${moneyText(toPay, currency, this.#reading.locale())} to pay now`;
  });
}
