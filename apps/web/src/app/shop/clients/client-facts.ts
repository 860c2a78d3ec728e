import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { moneyText, percentText, Reading, SectionHead } from '@lib/ui';
import { type Client } from './clients-api';

/** What was agreed with a client on prices, tax and paying. */
@Component({
  selector: 'tw-client-facts',
  imports: [SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Agreed" />
    <dl class="tw-facts">
      <dt>To pay within</dt>
      <dd>{{ terms() }}</dd>
      <dt>Tax</dt>
      <dd>{{ tax() }}</dd>
      <dt>Prices</dt>
      <dd>
        @for (price of prices(); track price) {
          <div class="tw-figures">{{ price }}</div>
        } @empty {
          as in the price book
        }
      </dd>
      @if (client().note) {
        <dt>Note</dt>
        <dd class="note">{{ client().note }}</dd>
      }
    </dl>
  `,
  styles: `
    .note {
      white-space: pre-line;
    }
  `,
})
export class ClientFacts {
  readonly #reading = inject(Reading);
  readonly client = input.required<Client>();

  protected readonly terms = computed(() => {
    const days = this.client().termsDays;
    return days === null ? 'as the settings say' : `${days} days`;
  });

  protected readonly tax = computed(() => {
    const { taxExempt, taxExemptReference } = this.client();
    if (!taxExempt) return 'by place and kind of line';
    return taxExemptReference ? `exempt, certificate ${taxExemptReference}` : 'exempt';
  });

  protected readonly prices = computed(() => {
    const agreed = this.client().overrides ?? {};
    const line = (value: number | null | undefined, text: (value: number) => string) =>
      value == null ? [] : [text(value)];
    return [
      ...line(agreed.normalPerHour, (v) => `${this.#money(v)} an hour`),
      ...line(agreed.afterHoursPerHour, (v) => `${this.#money(v)} an hour after hours`),
      ...line(agreed.tripAmount, (v) => `${this.#money(v)} a trip`),
      ...line(agreed.markupBasisPoints, (v) => `${percentText(v)} % on parts`),
      ...line(agreed.discountBasisPoints, (v) => `${percentText(v)} % off every line`),
    ];
  });

  #money(amount: number): string {
    return moneyText(amount, this.#reading.currency(), this.#reading.locale());
  }
}
