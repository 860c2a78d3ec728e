import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { BearerLabel, currencySign, MoneyText, Reading } from '@lib/ui';
import { jobWords, quantityWords } from './line-words';
import { type TicketJob, type TicketPreview } from './tickets-api';

type Sums = Pick<TicketPreview, 'list' | 'net' | 'tax' | 'total' | 'absorbed' | 'borneByShop'>;

/**
 * The lines of a ticket, machine by machine: what it is worth struck through where somebody else
 * bears it, what is charged, and beside it all how the figures came about.
 */
@Component({
  selector: 'tw-ticket-lines',
  imports: [BearerLabel, MoneyText],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './ticket-lines.html',
  styleUrl: './ticket-lines.scss',
})
export class TicketLines {
  readonly #reading = inject(Reading);
  readonly jobs = input.required<readonly TicketJob[]>();
  readonly sums = input.required<Sums>();
  readonly currency = input.required<string>();

  protected readonly sign = computed(() => currencySign(this.currency(), this.#reading.locale()));
  protected readonly quantityWords = quantityWords;
  protected readonly jobWords = jobWords;
  protected readonly borne = computed(() => {
    const { shop, supplier, contract, goodwill } = this.sums().absorbed;
    return [
      { words: 'Borne by the shop', amount: shop },
      { words: 'Given as goodwill', amount: goodwill },
      { words: 'Borne by the supplier', amount: supplier },
      { words: 'Covered by the contract', amount: contract },
    ].filter(({ amount }) => amount !== 0);
  });
}
